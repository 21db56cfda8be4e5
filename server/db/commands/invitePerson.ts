import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import { mailKeyOf } from '../queries/invitations'
import { things, type Thing } from '../queries/things'
import { dayIn, now, nowInstant } from '../../utils/clock'
import { invitationMail } from '../../utils/invitationMail'
import { newLinkToken } from '../../utils/linkToken'
import { newId } from '../../utils/newId'
import { problem, unsound } from '../../utils/problems'
import { INVITATION_DAYS } from '../../../shared/types/invitation'
import type { Invitation } from '../../../shared/schemas/invitation'
import type { Role } from '../../../shared/types/people'
import { ROLE_WORDS } from '../../../shared/utils/roleWords'
import { appendRecord } from './appendRecord'
import { addTenancy, refusingOverlap } from './createTenancy'
import { queueMessage } from './queueMessage'
import { refuseArchived } from './refuseArchived'

const DAY_MS = 86_400_000
export const invitationEnd = () => new Date(now().getTime() + INVITATION_DAYS * DAY_MS).toISOString()

/** Owners are the owners' own business: a manager neither makes nor removes one. */
export function refuseOwnersBusiness(actor: Actor, role: Role) {
  if (role === 'owner' && actor.role !== 'owner') throw problem(403, 'owners-only', 'Only an owner may do this for another owner.')
}

/** Writes the invitation and, for a tenant, the tenancy it is about when that is new; queues its mail. */
export function invitePerson(db: Db, actor: Actor, input: Invitation): Promise<{ id: string }> {
  refuseOwnersBusiness(actor, input.role)
  if (input.untilOn && input.untilOn < dayIn(actor.timeZone)) throw unsound({ untilOn: 'This day is over already.' })
  return refusingOverlap(() => db.transaction().execute(async (trx) => {
    const unit = await unitOf(trx, actor, input)
    await refuseKnown(trx, actor, input)
    const tenancyId = unit && input.role === 'tenant' ? await tenancyOf(trx, actor, unit, input) : null
    const { token, tokenHash } = newLinkToken()
    const invitation = await trx.insertInto('invitation').values({
      id: newId(), organisationId: actor.organisationId, email: input.email, role: input.role, unitId: unit?.id ?? null, tenancyId,
      untilOn: input.role === 'engineer' ? input.untilOn : null, tokenHash, invitedBy: actor.userId,
      expiresAt: invitationEnd(), acceptedAt: null, revokedAt: null, createdAt: nowInstant(),
    }).returningAll().executeTakeFirstOrThrow()
    await appendRecord(trx, actor, {
      organisationId: actor.organisationId, unitId: invitation.unitId, action: 'invitation sent', subjectKind: 'invitation', subjectId: invitation.id,
      after: { email: input.email, role: input.role, untilOn: invitation.untilOn },
    })
    await mailInvitation(trx, actor, invitation, token)
    return { id: invitation.id }
  }))
}

async function unitOf(trx: Trx, actor: Actor, { role, unitId }: Invitation): Promise<Thing<'unit'> | undefined> {
  if ((role !== 'tenant' && role !== 'engineer') || !unitId) return undefined
  const unit = await things.unit(trx, unitId)
  if (!unit || unit.organisationId !== actor.organisationId) throw unsound({ unitId: 'Choose one of your homes.' })
  refuseArchived(unit, 'unit')
  return unit
}

/** One person has one role here; only a tenant or an engineer may be invited again, for one more home. */
async function refuseKnown(trx: Trx, actor: Actor, { email, role, unitId }: Invitation) {
  const member = await trx.selectFrom('membership as m').innerJoin('appUser as u', 'u.id', 'm.userId').select(['u.name', 'm.role'])
    .where('m.organisationId', '=', actor.organisationId).where('u.email', '=', email).where('m.endedAt', 'is', null).executeTakeFirst()
  if (member && (member.role !== role || (role !== 'tenant' && role !== 'engineer'))) {
    const message = `${member.name} is here already, as ${ROLE_WORDS[member.role].article}. For another role, end that access first.`
    throw problem(409, 'already-member', message, { fields: { email: message } })
  }
  const open = await trx.selectFrom('invitation').select('id')
    .where('organisationId', '=', actor.organisationId).where('email', '=', email).where('acceptedAt', 'is', null).where('revokedAt', 'is', null)
    .where('expiresAt', '>', nowInstant())
    .where(eb => eb.or([eb('role', '!=', role), eb('unitId', 'is not distinct from', unitId)])).executeTakeFirst()
  if (open) {
    const message = 'There is an open invitation to this address. Send that one again, or take it back first.'
    throw problem(409, 'already-invited', message, { fields: { email: message } })
  }
}

async function tenancyOf(trx: Trx, actor: Actor, unit: Thing<'unit'>, input: Invitation): Promise<string> {
  if (input.tenancyId) {
    const tenancy = await things.tenancy(trx, input.tenancyId)
    if (!tenancy || tenancy.unitId !== unit.id) throw unsound({ tenancyId: 'Choose a tenancy of this home.' })
    return tenancy.id
  }
  const { id } = await addTenancy(trx, actor, unit, { tenantName: input.tenantName!, startsOn: input.startsOn!, endsOn: input.endsOn, notes: '' })
  return id
}

/** One mail a link: the key carries the count of sends. */
export async function mailInvitation(trx: Trx, actor: Actor, invitation: Thing<'invitation'>, token: string) {
  const facts = await trx.selectFrom('organisation as o')
    .leftJoin('unit as u', join => join.on('u.id', '=', invitation.unitId)).leftJoin('property as p', 'p.id', 'u.propertyId')
    .select(['o.name', 'o.contactPhone', 'u.name as unitName', 'p.name as propertyName']).where('o.id', '=', invitation.organisationId).executeTakeFirstOrThrow()
  await queueMessage(trx, {
    // Kept off the organisation's list of messages: its text carries a link that only this address may open.
    organisationId: null, userId: null, kind: 'invitation', mailClass: 'account', toAddress: invitation.email, dedupeKey: mailKeyOf(invitation),
    content: invitationMail({
      token, role: invitation.role, organisationName: facts.name, contactPhone: facts.contactPhone, inviterName: actor.name,
      home: facts.unitName === null ? null : `${facts.propertyName}, ${facts.unitName}`, untilOn: invitation.untilOn,
    }),
  })
}
