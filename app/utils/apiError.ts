import type { ApiErrorBody } from '#shared/schemas/api'

interface FetchFailure {
  statusCode?: number
  status?: number
  data?: unknown
}

/** What the API says about a refusal; null where there was no answer of the API at all. */
export function apiError(error: unknown): ApiErrorBody | null {
  const failure = error as FetchFailure | null
  const outer = failure?.data as { data?: unknown, code?: unknown } | undefined
  const body = (outer?.data ?? outer) as Partial<ApiErrorBody> | undefined
  return typeof body?.code === 'string' && typeof body.message === 'string' ? body as ApiErrorBody : null
}

export function apiStatus(error: unknown): number | null {
  const failure = error as FetchFailure | null
  return failure?.statusCode ?? failure?.status ?? null
}

/** One sentence for the reader, at the place where the action was. */
export function apiSentence(error: unknown): string {
  const known = apiError(error)
  if (known) return known.message
  const status = apiStatus(error)
  if (status === null) return 'The server does not answer. What you entered is still here; try again when the connection is back.'
  if (status === 401) return 'You are signed out. Sign in again; what you entered is still here.'
  return `The server answered ${status} and gave no reason. Try again; what you entered is still here.`
}
