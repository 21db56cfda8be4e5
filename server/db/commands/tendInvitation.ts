import type { Db, Trx } from '../connect'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import { nowInstant } from '../../utils/clock'
import { newLinkToken } from '../../utils/linkToken'
import { problem } from '../../utils/problems'
import { appendRecord } from './appendRecord'
import { invitationEnd, mailInvitation, refuseOwnersBusiness } from './invitePerson'

/** A new link by a new mail; the one sent before stops working. */
export function sendInvitationAgain(db: Db, actor: Actor, invitation: Thing<'invitation'>): Promise<{ expiresAt: string }> {
  refuseOwnersBusiness(actor, invitation.role)
  return db.transaction().execute(async (trx) => {
    const { token, tokenHash } = newLinkToken()
    const sent = await trx.updateTable('invitation').set(eb => ({ tokenHash, expiresAt: invitationEnd(), sends: eb('sends', '+', 1) }))
      .where('id', '=', invitation.id).where('acceptedAt', 'is', null).where('revokedAt', 'is', null).returningAll().executeTakeFirst()
    if (!sent) throw settled()
    await note(trx, actor, invitation, 'invitation sent again')
    await mailInvitation(trx, actor, sent, token)
    return { expiresAt: sent.expiresAt }
  })
}

export function revokeInvitation(db: Db, actor: Actor, invitation: Thing<'invitation'>): Promise<{ revoked: true }> {
  refuseOwnersBusiness(actor, invitation.role)
  return db.transaction().execute(async (trx) => {
    const taken = await trx.updateTable('invitation').set({ revokedAt: nowInstant() })
      .where('id', '=', invitation.id).where('acceptedAt', 'is', null).where('revokedAt', 'is', null).returning('id').executeTakeFirst()
    if (!taken) throw settled()
    await note(trx, actor, invitation, 'invitation taken back')
    return { revoked: true }
  })
}

const settled = () => problem(409, 'already-settled', 'This invitation has been accepted or taken back already.')

const note = (trx: Trx, actor: Actor, invitation: Thing<'invitation'>, action: string) => appendRecord(trx, actor, {
  organisationId: invitation.organisationId, unitId: invitation.unitId, action, subjectKind: 'invitation', subjectId: invitation.id,
  after: { email: invitation.email, role: invitation.role },
})
