import type { Role } from '../types/people'

/** What each role is called and what it may do, for people. */
export const ROLE_WORDS: Record<Role, { label: string, article: string, may: string }> = {
  owner: { label: 'Owner', article: 'an owner', may: 'Everything a manager may, and the settings of the organisation and its other owners.' },
  manager: { label: 'Manager', article: 'a manager', may: 'Sees and keeps every home: attics, ceilings, findings, jobs, people.' },
  tenant: { label: 'Tenant', article: 'a tenant', may: 'Reports ceilings in their own home, takes readings, sees what was done there.' },
  trades: { label: 'Trades', article: 'a tradesperson', may: 'Sees and does the jobs given to them, nothing else.' },
  engineer: { label: 'Engineer', article: 'an engineer', may: 'Reads the file of one home until a day you choose.' },
}

/** Where somebody starts after coming in with a role. */
export function startPageOf(role: Role, unitId: string | null): string {
  if (role === 'tenant') return '/my-home'
  if (role === 'trades') return '/upkeep'
  if (role === 'engineer') return unitId ? `/units/${unitId}` : '/'
  return '/overview'
}
