import type { Day, Defaulted, Instant, Json } from '../schema'

export interface AtticTables {
  attic: AtticTable
  atticSurvey: AtticSurveyTable
  atticDocument: AtticDocumentTable
  atticItem: AtticItemTable
  loadEvent: LoadEventTable
}

export interface AtticTable {
  id: string
  organisationId: string
  unitId: string
  name: string
  notes: Defaulted<string>
  inventoryConfirmedOn: Day | null
  archivedAt: Instant | null
  createdAt: Instant
  version: Defaulted<number>
}

/** `answers` holds the whole survey as entered (shared/types/attic.ts); the rating is kept as it was judged then. */
export interface AtticSurveyTable {
  id: string
  organisationId: string
  unitId: string
  atticId: string
  surveyedOn: Day
  answers: Json<object>
  ratedPsf: number
  onHold: boolean
  basis: string
  surveyedBy: string
  createdAt: Instant
}

export interface AtticDocumentTable {
  id: string
  organisationId: string
  unitId: string
  atticId: string
  kind: 'engineer letter' | 'permit drawing' | 'truss drawing' | 'inspection record'
  ratedPsf: number | null
  liftsHold: Defaulted<boolean>
  issuedOn: Day
  issuedBy: string
  covers: string
  fileName: string
  mediaType: string
  byteLength: number
  sha256: string
  storedKey: string
  addedBy: string
  createdAt: Instant
  withdrawnAt: Instant | null
}

/** Weights are of the whole line (all pieces together), in pounds; the place is from the field's first joist end. */
export interface AtticItemTable {
  id: string
  organisationId: string
  unitId: string
  atticId: string
  fieldNumber: Defaulted<number>
  catalogueKey: string | null
  name: string
  quantity: Defaulted<number>
  lowLb: number
  typicalLb: number
  highLb: number
  weightSource: 'catalogue' | 'estimate' | 'weighed'
  belongsTo: Defaulted<'landlord' | 'tenant'>
  xFt: number
  yFt: number
  lengthFt: number
  widthFt: number
  placedOn: Day
  removedOn: Day | null
  notes: Defaulted<string>
  createdAt: Instant
  version: Defaulted<number>
}

export interface LoadEventTable {
  id: string
  organisationId: string
  unitId: string
  atticId: string
  itemId: string
  kind: 'in' | 'out' | 'moved' | 'reweighed'
  happenedOn: Day
  deltaLb: number
  totalAfterLb: number
  detail: Json<object>
  recordedBy: string
  recordedAt: Instant
}
