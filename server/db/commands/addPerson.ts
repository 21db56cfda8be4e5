import type { Trx } from '../connect'
import { nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import type { Role } from '../../../shared/types/people'
import { appendRecord, type RecordActor } from './appendRecord'

export interface NewUser { email: string, name: string, passwordHash: string, phone?: string | null }

export async function addUser(trx: Trx, user: NewUser) {
  return trx.insertInto('appUser')
    .values({ id: newId(), email: user.email, name: user.name, phone: user.phone ?? null, passwordHash: user.passwordHash, mailRefusedAt: null, createdAt: nowInstant() })
    .returning(['id', 'name', 'email', 'sessionEpoch']).executeTakeFirstOrThrow()
}

export async function addOrganisation(trx: Trx, organisation: { name: string, timeZone?: string, isDemo?: boolean }): Promise<string> {
  const id = newId()
  await trx.insertInto('organisation')
    .values({ id, contactPhone: null, createdAt: nowInstant(), ...organisation }).execute()
  return id
}

export interface Joining { organisationId: string, user: { id: string, name: string }, role: Role }

/** Makes somebody a member, or a member again after theirs was ended. */
export async function joinOrganisation(trx: Trx, actor: RecordActor, { organisationId, user, role }: Joining): Promise<string> {
  const { id } = await trx.insertInto('membership')
    .values({ id: newId(), organisationId, userId: user.id, role, lastLookedAt: null, createdAt: nowInstant(), endedAt: null })
    .onConflict(conflict => conflict.columns(['organisationId', 'userId']).doUpdateSet({ role, endedAt: null }))
    .returning('id').executeTakeFirstOrThrow()
  await appendRecord(trx, actor, {
    organisationId, unitId: null, action: 'person joined', subjectKind: 'person', subjectId: user.id, after: { name: user.name, role },
  })
  return id
}
