import { compiledOnce } from '../compiledOnce'
import type { Db } from '../connect'
import { judgeContents } from '../../../shared/utils/attic/judgeContents'
import type { AtticDetail } from '../../../shared/types/atticDetail'
import type { RatingBasis } from '../../../shared/types/atticRating'
import { dayIn } from '../../utils/clock'
import { notFound } from '../../utils/problems'
import { asAtticDocument, findDocuments, findItemPhotos, findItemsIn, findLoadEvents, findSurveys } from './attics'

interface AtticRow { id: string, unitId: string, name: string, notes: string, inventoryConfirmedOn: string | null, archivedAt: string | null, version: number }

const placeOf = compiledOnce((db, { unitId }: { unitId: string }) =>
  db.selectFrom('unit as u').innerJoin('property as p', 'p.id', 'u.propertyId').innerJoin('organisation as o', 'o.id', 'u.organisationId')
    .select(['u.id as unitId', 'u.name as unitName', 'p.id as propertyId', 'p.name as propertyName', 'p.yearBuilt', 'p.codeBasis', 'o.timeZone'])
    .where('u.id', '=', unitId))

/** Everything an attic's page shows, judged as it stands now. */
export async function readAttic(db: Db, attic: AtticRow): Promise<Omit<AtticDetail, 'abilities' | 'guesses'>> {
  const [place, surveys, documents, items, events, photos] = await Promise.all([
    placeOf.first(db, { unitId: attic.unitId }),
    findSurveys(db, attic.id), findDocuments(db, attic.id), findItemsIn(db, attic.id), findLoadEvents(db, attic.id),
    findItemPhotos(db, attic.id),
  ])
  if (!place) throw notFound()
  const survey = surveys[0]?.answers ?? null
  const { id, name, notes, inventoryConfirmedOn, archivedAt, version } = attic
  return {
    today: dayIn(place.timeZone),
    attic: { id, name, notes, inventoryConfirmedOn, archivedAt, version },
    unit: { id: place.unitId, name: place.unitName },
    property: { id: place.propertyId, name: place.propertyName, yearBuilt: place.yearBuilt, codeBasis: place.codeBasis },
    survey,
    surveys: surveys.map(({ answers: _answers, basis, ...row }) => ({ ...row, basis: basis as RatingBasis })),
    documents: documents.map(row => ({
      id: row.id, kind: row.kind, ratedPsf: row.ratedPsf, liftsHold: row.liftsHold, acceptsStrongbacks: row.acceptsStrongbacks, writtenOn: row.writtenOn, writtenBy: row.writtenBy,
      coversWholeAttic: row.coversWholeAttic, area: row.area, fileName: row.fileName, createdAt: row.createdAt,
    })),
    items,
    events,
    itemPhotos: photos.map(({ id: photoId, itemId }) => ({ id: photoId, itemId: itemId! })),
    contents: judgeContents({ survey, documents: documents.map(asAtticDocument), items }),
  }
}
