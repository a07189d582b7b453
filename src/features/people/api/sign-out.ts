import { useMutation } from '@tanstack/react-query'
import { api } from '../../../lib/api-client'

const signOut = () => api.tell('DELETE', '/api/session')

export const useSignOut = () => useMutation({ mutationFn: signOut })
