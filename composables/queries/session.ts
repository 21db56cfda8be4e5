import { useQueryClient } from '@tanstack/vue-query'
import { useServerQuery } from '~/composables/useServerQuery'
import type { AccountEdit, ChangePassword, SignIn } from '~/shared/schemas/account'
import type { Me } from '~/shared/types/people'

export const meKey = ['me'] as const

/** The signed-in person; on private pages it is there from the first render, fetched by the session middleware. */
export function useMe() {
  return useServerQuery<Me>({ key: meKey, path: '/api/me' })
}

/** Everything about coming and going. What one person saw is forgotten before the next one comes. */
export function useSignInOut() {
  const client = useQueryClient()
  const post = async (path: string, body?: object) => {
    await $fetch<unknown>(path, { method: 'POST', body })
    client.clear()
    return true
  }
  return {
    signIn: (input: SignIn) => post('/api/auth/sign-in', input),
    signOut: () => post('/api/auth/sign-out'),
  }
}

export function useAccountChanges() {
  const client = useQueryClient()
  return {
    saveAccount: async (input: AccountEdit) => {
      const me = await $fetch<Me>('/api/me', { method: 'PATCH', body: input })
      client.setQueryData(meKey, me)
      return me
    },
    changePassword: (input: ChangePassword) => $fetch('/api/me/password', { method: 'POST', body: input }),
    switchOrganisation: async (organisationId: string) => {
      await $fetch('/api/me/organisation', { method: 'POST', body: { organisationId } })
      client.clear()
    },
  }
}
