import type { Db, Trx } from '../connect'
import { findUserByEmail } from '../queries/accounts'
import { findOpenInvitation } from '../queries/invitations'
import { things } from '../queries/things'
import { dayIn, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { makePasswordHash } from '../../utils/passwords'
import { linkClosed, problem, unsound } from '../../utils/problems'
import type { Acceptance } from '../../../shared/schemas/invitation'
import { ROLE_WORDS, startPageOf } from '../../../shared/utils/roleWords'
import { appendRecord, type RecordActor } from './appendRecord'
import { addUser, joinOrganisation } from './addPerson'
import { addTenancy } from './createTenancy'

type OpenInvitation = Awaited<ReturnType<typeof findOpenInvitation>>
interface Person { id: string, name: string, sessionEpoch: number }

export interface Accepted { user: Person, organisationId: string, startPage: string }

/** Lets in whoever holds the link: as a new person, or as the account of that address when they are signed in as it. */
export async function acceptInvitation(db: Db, token: string | undefined, acceptance: Acceptance, signedInId: string | undefined): Promise<Accepted> {
  const invitation = await findOpenInvitation(db, token)
  const account = await findUserByEmail(db, invitation.email)
  if (account && account.id !== signedInId) throw problem(401, 'sign-in-first', `There is an account for ${invitation.email}. Sign in with it to accept.`)
  const newcomer = account ? undefined : await newcomerFrom(invitation.email, acceptance)
  return db.transaction().execute(async (trx) => {
    await claim(trx, invitation)
    const user = account ?? await addUser(trx, newcomer!)
    await join(trx, invitation, user)
    await giveAccess(trx, invitation, user)
    return { user, organisationId: invitation.organisationId, startPage: startPageOf(invitation.role, invitation.unitId) }
  })
}

async function newcomerFrom(email: string, { name, password }: Acceptance) {
  if (!name || !password) throw unsound({ ...(name ? {} : { name: 'What is your name?' }), ...(password ? {} : { password: 'Choose a password.' }) })
  return { email, name, passwordHash: await makePasswordHash(password) }
}

/** Of two uses at the same moment one comes second. */
async function claim(trx: Trx, invitation: OpenInvitation) {
  const at = nowInstant()
  const taken = await trx.updateTable('invitation').set({ acceptedAt: at })
    .where('id', '=', invitation.id).where('tokenHash', '=', invitation.tokenHash)
    .where('acceptedAt', 'is', null).where('revokedAt', 'is', null).where('expiresAt', '>', at).returning('id').executeTakeFirst()
  if (!taken) throw linkClosed('link-used', 'This invitation has been used or taken back a moment ago.')
}

async function join(trx: Trx, { organisationId, role }: OpenInvitation, user: Person) {
  const member = await trx.selectFrom('membership').select('role').where('organisationId', '=', organisationId)
    .where('userId', '=', user.id).where('endedAt', 'is', null).forUpdate().executeTakeFirst()
  if (!member) return joinOrganisation(trx, actorOf(user), { organisationId, user, role })
  if (member.role !== role) throw problem(409, 'already-member', `You are here already, as ${ROLE_WORDS[member.role].article}. One person has one role in an organisation.`)
}

const actorOf = (user: Person): RecordActor => ({ userId: user.id, name: user.name })

async function giveAccess(trx: Trx, invitation: OpenInvitation, user: Person) {
  const { organisationId, role, unitId, untilOn } = invitation
  if (!unitId || (role !== 'tenant' && role !== 'engineer')) return
  if (role === 'tenant') {
    const tenancyId = invitation.tenancyId ?? await tenancyFromToday(trx, invitation, unitId, user)
    await trx.insertInto('tenancyPerson').values({ tenancyId, organisationId, userId: user.id }).onConflict(conflict => conflict.doNothing()).execute()
  }
  else {
    await trx.insertInto('unitAccess').values({ id: newId(), organisationId, unitId, userId: user.id, untilOn, createdAt: nowInstant() })
      .onConflict(conflict => conflict.columns(['unitId', 'userId']).doUpdateSet({ untilOn })).execute()
  }
  await appendRecord(trx, actorOf(user), {
    organisationId, unitId, action: `${role} came in`, subjectKind: 'person', subjectId: user.id, after: { name: user.name, role, untilOn },
  })
}

/** For an invitation that named no tenancy: the one that runs today, else a new one from today in the person's name. */
async function tenancyFromToday(trx: Trx, { timeZone }: OpenInvitation, unitId: string, user: Person): Promise<string> {
  const today = dayIn(timeZone)
  const running = await trx.selectFrom('tenancy').select('id').where('unitId', '=', unitId).where('startsOn', '<=', today)
    .where(eb => eb.or([eb('endsOn', 'is', null), eb('endsOn', '>=', today)])).executeTakeFirst()
  if (running) return running.id
  const unit = (await things.unit(trx, unitId))!
  const { id } = await addTenancy(trx, actorOf(user), unit, { tenantName: user.name, startsOn: today, endsOn: null, notes: '' })
  return id
}
