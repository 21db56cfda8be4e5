/** Terms of storage for one attic as they stand; the sentences are what is signed. */
export interface StorageTerms { title: string, rules: string[], cautions: string[] }

export interface TermsSignature {
  id: string
  signedName: string
  signedAt: string
  /** What stood there when it was signed. */
  terms: StorageTerms
  /** The same as now: an attic whose rating changed has new terms. */
  isCurrent: boolean
  isMine: boolean
}

export interface TermsPage {
  atticName: string
  unitId: string
  unitName: string
  propertyName: string
  organisationName: string
  terms: StorageTerms
  signatures: TermsSignature[]
  abilities: string[]
}
