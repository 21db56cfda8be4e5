import type { AtticSurvey, DocumentKind } from '../../../shared/types/attic'
import type { ItemCategory } from '../../../shared/types/item'
import type { StorageTerms } from '../../../shared/types/storageTerms'
import type { Day, Defaulted, Instant, Json } from '../schema'

export interface AtticTables {
  attic: AtticTable
  atticSurvey: AtticSurveyTable
  atticDocument: AtticDocumentTable
  atticItem: AtticItemTable
  loadEvent: LoadEventTable
  inventoryImport: InventoryImportTable
  termsSignature: TermsSignatureTable
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
  answers: Json<AtticSurvey>
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
  kind: DocumentKind
  ratedPsf: number | null
  liftsHold: Defaulted<boolean>
  acceptsStrongbacks: Defaulted<boolean>
  writtenOn: Day
  writtenBy: string
  coversWholeAttic: boolean
  area: Defaulted<string>
  fileName: string
  mediaType: string
  byteLength: number
  sha256: string
  storedKey: string
  addedBy: string
  createdAt: Instant
  withdrawnAt: Instant | null
}

/** Weights are of one piece, in pounds; the footprint is of the whole pile, its place from the field's first joist end. */
export interface AtticItemTable {
  id: string
  organisationId: string
  unitId: string
  atticId: string
  fieldNumber: Defaulted<number>
  catalogueKey: string | null
  name: string
  category: Defaulted<ItemCategory>
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
  heightFt: number | null
  placedOn: Day
  removedOn: Day | null
  notes: Defaulted<string>
  keptDespite: Defaulted<string>
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

/** A list that was read in; the key makes a second sending answer the first. */
export interface InventoryImportTable {
  id: string
  organisationId: string
  unitId: string
  atticId: string
  importedBy: string
  clientKey: string
  items: number
  skipped: number
  importedAt: Instant
}

/** Append-only: what was signed stays as it was. */
export interface TermsSignatureTable {
  id: string
  organisationId: string
  unitId: string
  atticId: string
  userId: string
  signedName: string
  terms: Json<StorageTerms>
  signedAt: Instant
}
