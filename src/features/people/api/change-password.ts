import { useMutation } from '@tanstack/react-query'
import type { ChangePasswordRequest } from '#shared/api/session'
import { api } from '../../../lib/api-client'

const changePassword = (request: ChangePasswordRequest) => api.tell('POST', '/api/session/password', request)

export const useChangePassword = () => useMutation({ mutationFn: changePassword })
