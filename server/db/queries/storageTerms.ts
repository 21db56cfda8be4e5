import { sql } from 'kysely'
import type { Db } from '../connect'
import type { Actor } from './actor'
import { compiledOnce } from '../compiledOnce'
import { atticsOf } from './unitParts'
import { notFound } from '../../utils/problems'
import { abilitiesOf } from '../../utils/policy'
import type { TermsPage } from '../../../shared/types/storageTerms'
import { isSameTerms, storageTerms } from '../../../shared/utils/messages/storageTerms'
import { findLatestSurvey } from './attics'

const placeOf = compiledOnce((db, { unitId }: { unitId: string }) =>
  db.selectFrom('unit as u').innerJoin('property as p', 'p.id', 'u.propertyId').innerJoin('organisation as o', 'o.id', 'u.organisationId')
    .select(['u.name as unitName', 'p.name as propertyName', 'o.name as organisationName', atticsOf(db, sql.ref('u.id')).as('attics')]).where('u.id', '=', unitId))

const signaturesOf = compiledOnce((db, { atticId }: { atticId: string }) =>
  db.selectFrom('termsSignature').selectAll().where('atticId', '=', atticId).orderBy('signedAt', 'desc').orderBy('id', 'desc').limit(50))

/** The terms of one attic as it was last judged, and who signed which. A tenant sees their own signatures only. */
export async function readTerms(db: Db, actor: Actor, attic: { id: string, unitId: string, name: string }): Promise<TermsPage> {
  const [place, survey, rows] = await Promise.all([placeOf.first(db, { unitId: attic.unitId }), findLatestSurvey(db, attic.id), signaturesOf.rows(db, { atticId: attic.id })])
  const facts = place?.attics?.find(one => one.id === attic.id)
  if (!place || !facts) throw notFound()
  const terms = storageTerms({ ...facts, isTrussed: survey?.answers.framing === 'trusses' })
  const seen = actor.role === 'tenant' ? rows.filter(row => row.userId === actor.userId) : rows
  return {
    atticName: attic.name, unitId: attic.unitId, unitName: place.unitName, propertyName: place.propertyName, organisationName: place.organisationName, terms,
    signatures: seen.map(({ id, signedName, signedAt, terms: signed, userId }) => ({ id, signedName, signedAt, terms: signed, isCurrent: isSameTerms(signed, terms), isMine: userId === actor.userId })),
    abilities: abilitiesOf(actor.role),
  }
}
