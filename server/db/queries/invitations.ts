import { sql } from 'kysely'
import type { Db } from '../connect'
import type { Actor } from './actor'
import { nowInstant } from '../../utils/clock'
import { hashLinkToken, isLinkToken } from '../../utils/linkToken'
import { linkClosed } from '../../utils/problems'
import type { HomeName, InvitationOffer, InvitationRow } from '../../../shared/types/invitation'
import { likeAnywhere, pageOf, readCursor } from '../../utils/cursor'
import type { Page } from '../../../shared/types/home'

const LIMIT = 50

export const mailKeyOf = (invitation: { id: string, sends: number }) => `invitation:${invitation.id}:${invitation.sends}`

/** Invitations nobody has accepted or taken back, newest first, with how their mail fares. */
export async function listInvitations(db: Db, actor: Actor, { search, after }: { search?: string, after?: string }): Promise<Page<InvitationRow>> {
  const from = readCursor(after, ['text', 'id'])
  const rows = await db.selectFrom('invitation as i')
    .innerJoin('appUser as by', 'by.id', 'i.invitedBy')
    .leftJoin('unit as u', 'u.id', 'i.unitId').leftJoin('property as p', 'p.id', 'u.propertyId')
    .leftJoin('tenancy as t', 't.id', 'i.tenancyId')
    .leftJoin('message as m', join => join.on(sql<boolean>`m.dedupe_key = 'invitation:' || i.id || ':' || i.sends`))
    .select(['i.id', 'i.email', 'i.role', 'i.untilOn', 'i.createdAt', 'i.expiresAt', 'by.name as invitedByName', 't.tenantName', 'm.state as mail',
      'u.id as unitId', 'u.name as unitName', 'p.name as propertyName'])
    .where('i.organisationId', '=', actor.organisationId).where('i.acceptedAt', 'is', null).where('i.revokedAt', 'is', null)
    .$if(Boolean(search), query => query.where('i.email', 'ilike', likeAnywhere(search!)))
    .$if(from !== undefined, query => query.where(sql<boolean>`(i.created_at, i.id) < (${from![0]}::timestamptz, ${from![1]}::uuid)`))
    .orderBy('i.createdAt', 'desc').orderBy('i.id', 'desc').limit(LIMIT + 1).execute()
  const page = pageOf(rows, LIMIT, row => [row.createdAt, row.id])
  const at = nowInstant()
  return {
    ...page,
    rows: page.rows.map(({ unitId, unitName, propertyName, ...row }) => ({
      ...row, unit: homeName(unitId, unitName, propertyName), state: row.expiresAt > at ? 'open' : 'expired',
    })),
  }
}

const homeName = (id: string | null, name: string | null, propertyName: string | null): HomeName | null =>
  id ? { id, name: name ?? '', propertyName: propertyName ?? '' } : null

/** The invitation a link opens; 404 or 410 when it opens none. */
export async function findOpenInvitation(db: Db, token: string | undefined) {
  const row = isLinkToken(token)
    ? await db.selectFrom('invitation as i').innerJoin('organisation as o', 'o.id', 'i.organisationId').innerJoin('appUser as by', 'by.id', 'i.invitedBy')
        .leftJoin('unit as u', 'u.id', 'i.unitId').leftJoin('property as p', 'p.id', 'u.propertyId')
        .selectAll('i').select(['o.name as organisationName', 'o.timeZone', 'by.name as inviterName', 'u.name as unitName', 'p.name as propertyName'])
        .where('i.tokenHash', '=', hashLinkToken(token)).executeTakeFirst()
    : undefined
  if (!row) throw linkClosed('link-unknown', 'This link is not one of ours, or a newer mail has replaced it.')
  if (row.acceptedAt) throw linkClosed('link-used', 'This invitation has been accepted already. Sign in with the address it was sent to.')
  if (row.revokedAt) throw linkClosed('link-revoked', `${row.organisationName} has taken this invitation back.`)
  if (row.expiresAt <= nowInstant()) throw linkClosed('link-expired', `This invitation was good for two weeks, and they are over. Ask ${row.organisationName} to send it again.`)
  return row
}

export async function readOffer(db: Db, token: string | undefined, signedInAs: string | null): Promise<InvitationOffer> {
  const row = await findOpenInvitation(db, token)
  const account = await db.selectFrom('appUser').select('id').where('email', '=', row.email).executeTakeFirst()
  return {
    organisationName: row.organisationName, inviterName: row.inviterName, email: row.email, role: row.role,
    unit: row.unitName === null ? null : { name: row.unitName, propertyName: row.propertyName ?? '' },
    untilOn: row.untilOn, expiresAt: row.expiresAt, accountExists: account !== undefined, signedInAs,
  }
}
