import type { AtticDocument, DocumentKind, Framing } from '../../types/attic'
import type { HoldReason, RatingCaution } from '../../types/atticRating'

/** Papers that may state a rating, by framing. Trusses and unknown framing: only their drawings or an engineer. */
const RATING_KINDS: Record<Framing, DocumentKind[]> = {
  'rafters-and-joists': ['engineer-letter', 'permit'],
  'trusses': ['engineer-letter', 'truss-drawing'],
  'unknown': ['engineer-letter', 'truss-drawing'],
}
const LIFTING_KINDS: DocumentKind[] = ['engineer-letter', 'inspection-record']

type RatingDocument = AtticDocument & { ratedPsf: number }
const rates = (document: AtticDocument): document is RatingDocument =>
  document.kind !== 'inspection-record' && document.ratedPsf !== null && Number.isFinite(document.ratedPsf) && document.ratedPsf >= 0

export interface DocumentedRating {
  /** The newest paper that rates the whole attic; of two on one day the lower. */
  whole: RatingDocument | null
  /** The lowest figure any paper gives for a part, when it is newer than `whole` or there is no such; it holds back the whole attic. */
  part: RatingDocument | null
  cautions: RatingCaution[]
}

export function documentedRating(documents: AtticDocument[], framing: Framing): DocumentedRating {
  const cautions: RatingCaution[] = []
  const usable: RatingDocument[] = []
  for (const document of documents.filter(rates)) {
    if (!document.attached) cautions.push({ code: 'document-not-attached', kind: document.kind })
    else if (!RATING_KINDS[framing].includes(document.kind)) cautions.push({ code: 'document-not-for-framing', kind: document.kind, framing })
    else usable.push(document)
  }
  const newestFirst = [...usable].sort((a, b) => b.writtenOn.localeCompare(a.writtenOn) || a.ratedPsf - b.ratedPsf)
  const whole = newestFirst.find(document => document.coversWholeAttic) ?? null
  const parts = newestFirst.filter(document => !document.coversWholeAttic && (whole === null || document.writtenOn >= whole.writtenOn))
  for (const document of parts) cautions.push({ code: 'document-covers-part', psf: document.ratedPsf, area: document.area })
  const part = parts.reduce<RatingDocument | null>((least, document) => least && least.ratedPsf <= document.ratedPsf ? least : document, null)
  return { whole, part, cautions }
}

export interface HoldState { held: boolean, cautions: RatingCaution[] }

/** A hold ends with an inspection record or an engineer's letter for the whole attic, attached, written on or after the survey that found it. */
export function holdState(reasons: HoldReason[], documents: AtticDocument[], surveyedOn: string): HoldState {
  if (reasons.length === 0) return { held: false, cautions: [] }
  const cautions: RatingCaution[] = []
  let held = true
  for (const document of documents.filter(candidate => candidate.liftsHold && LIFTING_KINDS.includes(candidate.kind))) {
    const { kind, writtenOn, writtenBy } = document
    if (!document.attached) cautions.push({ code: 'document-not-attached', kind })
    else if (!document.coversWholeAttic) cautions.push({ code: 'document-covers-part', psf: document.ratedPsf, area: document.area })
    else if (writtenOn < surveyedOn) cautions.push({ code: 'document-before-survey', writtenOn, surveyedOn })
    else {
      held = false
      cautions.push({ code: 'hold-lifted', kind, writtenOn, writtenBy })
    }
  }
  return { held, cautions }
}
