import { useMutation, useQuery } from '@tanstack/react-query'
import { api } from '../../../lib/api-client'

export const useForgottenPassword = () =>
  useMutation({ mutationFn: (email: string) => api.tell('POST', '/api/password-resets', { email }) })

/** Whether the link still holds. */
export const useResetLink = (token: string) =>
  useQuery({
    queryKey: ['password-reset', token] as const,
    queryFn: async ({ signal }) => {
      await api.tell('POST', '/api/password-resets/look', { token }, { signal })
      return true
    },
    retry: false,
    staleTime: Infinity,
  })

export const useNewPassword = () =>
  useMutation({ mutationFn: (request: { token: string; newPassword: string }) => api.tell('POST', '/api/password-resets/use', request) })
