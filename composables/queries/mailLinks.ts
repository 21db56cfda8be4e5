import { useQuery, useQueryClient, type QueryKey } from '@tanstack/vue-query'
import type { SignUp } from '~/shared/schemas/account'
import type { Acceptance } from '~/shared/schemas/invitation'
import type { InvitationOffer } from '~/shared/types/invitation'
import type { Beginning } from '~/shared/types/people'

/** What a link of a mail opens, or the sentence why it opens nothing any more. */
export type LinkState<T> = { open: T, closed?: undefined } | { open?: undefined, closed: string }

export const useResetLink = (token: string) =>
  useMailLink<{ email: string }>(['me', 'reset-link', token], `/api/auth/reset-password/${encodeURIComponent(token)}`)

export const useBeginning = (token: string) =>
  useMailLink<Beginning>(['me', 'beginning', token], `/api/auth/beginnings/${encodeURIComponent(token)}`)

export const useInvitation = (token: string) =>
  useMailLink<InvitationOffer>(['me', 'invitation', token], `/api/auth/invitations/${encodeURIComponent(token)}`)

export function useLinkAnswers() {
  const client = useQueryClient()
  const post = async <A>(path: string, body: object) => {
    const answer = await $fetch(path, { method: 'POST', body }) as A
    client.clear()
    return answer
  }
  return {
    askForLink: (input: { email: string }) => post<{ taken: true }>('/api/auth/forgotten-password', input),
    askToBegin: (input: SignUp) => post<{ taken: true }>('/api/auth/sign-up', input),
    begin: (token: string, input: { password: string }) => post<{ organisationId: string }>(`/api/auth/beginnings/${encodeURIComponent(token)}`, input),
    resetPassword: (token: string, input: { password: string }) => post<{ changed: true }>(`/api/auth/reset-password/${encodeURIComponent(token)}`, input),
    acceptInvitation: (token: string, input: Acceptance) => post<{ startPage: string }>(`/api/auth/invitations/${encodeURIComponent(token)}`, input),
  }
}

/** A closed link is an answer like another: kept as data, so that server and browser draw the same page. */
function useMailLink<T>(queryKey: QueryKey, path: string) {
  const request = useRequestFetch()
  const query = useQuery({
    queryKey,
    queryFn: async (): Promise<LinkState<T>> => {
      try { return { open: await request(path) as T } }
      catch (error) {
        const closed = closedBecause(error)
        if (closed) return { closed }
        throw error
      }
    },
  })
  onServerPrefetch(async () => {
    await query.suspense()
    if (query.error.value) throw createError({ statusCode: (query.error.value as { statusCode?: number }).statusCode || 503, fatal: true })
  })
  return query
}

function closedBecause(error: unknown): string | undefined {
  const { statusCode, data } = error as { statusCode?: number, data?: { message?: string } }
  return statusCode === 404 || statusCode === 410 ? data?.message ?? 'This link opens nothing any more.' : undefined
}
