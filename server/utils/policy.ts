import type { Role } from '../../shared/types/people'

/** How far an ability reaches: the whole organisation, the units that are this person's, or what is assigned to them. */
export type Reach = 'all' | 'own units' | 'assigned'

const staff = { owner: 'all', manager: 'all' } as const

/** One table, ability × role. What is not written here is not allowed. */
export const policy = {
  'use account': { ...staff, tenant: 'all', trades: 'all', engineer: 'all' },
  'manage organisation': { owner: 'all' },
  'see settings': staff,
  'manage people': staff,
  'see portfolio': staff,
  'see property': staff,
  'edit homes': staff,
  'see unit': { ...staff, tenant: 'own units', engineer: 'own units' },
  'see attic': { ...staff, tenant: 'own units', engineer: 'own units' },
  'edit attic': staff,
  'confirm inventory': { ...staff, tenant: 'own units' },
  'sign terms': { tenant: 'own units' },
  'see mark': { ...staff, tenant: 'own units', engineer: 'own units' },
  'edit mark': staff,
  'report observation': { ...staff, tenant: 'own units' },
  'enter paper report': staff,
  'record reading': { ...staff, tenant: 'own units' },
  'add photo': { ...staff, tenant: 'own units' },
  'see finding': { ...staff, engineer: 'own units' },
  'see notice': { ...staff, tenant: 'own units', engineer: 'own units' },
  'raise notice': staff,
  'acknowledge finding': staff,
  'judge finding': staff,
  'see ledger': staff,
  'see unload trial': { ...staff, tenant: 'own units', engineer: 'own units' },
  'run unload trial': staff,
  'see job': { ...staff, trades: 'assigned', tenant: 'own units' },
  'edit job': staff,
  'do job': { ...staff, trades: 'assigned' },
  'see record': { ...staff, engineer: 'own units' },
  'run review': staff,
  'see messages': staff,
} as const satisfies Record<string, Partial<Record<Role, Reach>>>

export type Ability = keyof typeof policy
export const ABILITIES = Object.keys(policy) as Ability[]

export function reachOf(role: Role, ability: Ability): Reach | undefined {
  return (policy[ability] as Partial<Record<Role, Reach>>)[role]
}

export const abilitiesOf = (role: Role) => ABILITIES.filter(ability => reachOf(role, ability))

/** What a thing must tell for a right over it to be judged. */
export interface Reachable { organisationId: string, unitId: string | null, assigneeUserId?: string | null }

/** Is this thing within reach? Judged after membership of its organisation is certain. */
export function withinReach(actor: { userId: string, role: Role, unitIds: string[] }, ability: Ability, thing: Reachable): 'yes' | 'role too small' | 'not theirs' {
  const known = actor.role === 'owner' || actor.role === 'manager'
    || (thing.unitId !== null && actor.unitIds.includes(thing.unitId))
    || thing.assigneeUserId === actor.userId
  if (!known) return 'not theirs'
  const reach = reachOf(actor.role, ability)
  if (!reach) return 'role too small'
  if (reach === 'assigned' && thing.assigneeUserId !== actor.userId) return 'not theirs'
  return 'yes'
}
