import { QueryClient } from '@tanstack/react-query'
import { ApiError } from './api-error.ts'

export const queryClient = new QueryClient({
  defaultOptions: {
    queries: {
      staleTime: 30_000,
      retry: (count, error) =>
        count < 2 && error instanceof ApiError && (error.problem?.retryable ?? false) && error.status !== 429,
      refetchOnWindowFocus: false,
    },
  },
})
