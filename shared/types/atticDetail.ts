import type { AtticSurvey, CodeBasis, DocumentKind } from './attic'
import type { RatingBasis } from './atticRating'
import type { JudgedContents } from './contents'
import type { StoredItem } from './item'
import type { UnitLoadState } from './home'

export interface SurveyRow {
  id: string
  surveyedOn: string
  ratedPsf: number
  onHold: boolean
  basis: RatingBasis
  surveyedByName: string
  createdAt: string
}

/** A survey with all its answers, as it was rated on its day. */
export interface KeptSurvey extends SurveyRow { answers: AtticSurvey }

export interface DocumentRow {
  id: string
  kind: DocumentKind
  ratedPsf: number | null
  liftsHold: boolean
  acceptsStrongbacks: boolean
  writtenOn: string
  writtenBy: string
  coversWholeAttic: boolean
  area: string
  fileName: string
  createdAt: string
}

export interface LoadEventRow {
  id: string
  kind: 'in' | 'out' | 'moved' | 'reweighed'
  happenedOn: string
  deltaLb: number
  totalAfterLb: number
  itemName: string
  recordedByName: string
  recordedAt: string
}

/** `medianRatio`: weighed over noted before; above 1 the person guesses too little. */
export interface GuessRecord { count: number, medianRatio: number | null }

/** What GET /api/attics/:id answers. */
export interface AtticDetail {
  today: string
  attic: { id: string, name: string, notes: string, inventoryConfirmedOn: string | null, version: number, archivedAt: string | null }
  unit: { id: string, name: string }
  property: { id: string, name: string, yearBuilt: number | null, codeBasis: CodeBasis | null }
  survey: AtticSurvey | null
  surveys: SurveyRow[]
  documents: DocumentRow[]
  items: StoredItem[]
  events: LoadEventRow[]
  itemPhotos: { id: string, itemId: string }[]
  /** The asker's own weighings so far against what was noted before. */
  guesses: GuessRecord
  contents: JudgedContents
  abilities: string[]
}

export interface AtticListRow {
  id: string
  name: string
  unitId: string
  unitName: string
  propertyName: string
  inventoryConfirmedOn: string | null
  surveyedOn: string | null
  /** As last judged; null before the first survey. */
  ratedPsf: number | null
  loadState: UnitLoadState | null
  utilisation: number | null
  storedLb: number
  itemCount: number
}
