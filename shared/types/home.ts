import type { AtticDocument, AtticSurvey, CeilingFinish, CodeBasis } from './attic'
import type { Severity, StoredFinding } from './finding'
import type { NamedContentsItem } from './item'
import type { Activity, MarkKind } from './mark'

export interface PropertyFacts {
  id: string
  name: string
  addressLines: string[]
  yearBuilt: number | null
  notes: string
  /** On the property's own page: the table of loads its attics go by; null: IRC Table R301.5. */
  codeBasis?: CodeBasis | null
  archivedAt: string | null
  version: number
}

export interface UnitFacts {
  id: string
  propertyId: string
  name: string
  notes: string
  /** How to get in. Null for people who may not edit homes. */
  accessNotes: string | null
  archivedAt: string | null
  version: number
}

export interface RoomFacts {
  id: string
  name: string
  isBedroom: boolean
  lengthFt: number | null
  widthFt: number | null
  ceilingHeightIn: number | null
  ceilingFinish: CeilingFinish
  sort: number
  version: number
}

export interface TenancyFacts {
  id: string
  tenantName: string
  startsOn: string
  endsOn: string | null
  notes: string
  version: number
  /** Those of them who have an account. */
  people: string[]
}

/** What the section needs of a joist field; null where it was not measured. */
export interface FieldMeasures { spanFt: number | null, spacingIn: number | null, joistCount: number | null }

export interface AtticOfUnit {
  id: string
  name: string
  notes: string
  inventoryConfirmedOn: string | null
  surveyedOn: string | null
  ratedPsf: number | null
  onHold: boolean | null
  basis: string | null
  /** As last judged; null before the first time. */
  loadState: UnitLoadState | null
  utilisation: number | null
  storedLb: number
  fields: FieldMeasures[]
  items: NamedContentsItem[]
  /** The survey that holds now and the papers in force: only on the unit's own page, where the contents are judged joist by joist. */
  survey?: AtticSurvey | null
  documents?: AtticDocument[]
}

export interface MarkOfUnit {
  id: string
  number: number
  kind: MarkKind
  label: string
  roomId: string
  pinX: number
  pinY: number
  activity: Activity
  state: 'open' | 'repaired' | 'closed'
  lastValue: number | null
  lastReadOn: string | null
  slopePerYear: number | null
  nextReadingOn: string | null
  widthClass: number | null
  stainState: string | null
}

/** An open finding, with the day it is to be looked at again when somebody acknowledged it. */
export type FindingOfUnit = StoredFinding

export interface JobOfUnit {
  id: string
  number: number
  title: string
  priority: 'danger' | 'urgent' | 'routine'
  state: 'planned' | 'scheduled' | 'done' | 'confirmed' | 'cancelled'
  dueOn: string
  scheduledOn: string | null
}

export type UnitLoadState = 'within' | 'near' | 'over' | 'hold' | 'unsurveyed'

export interface UnitStatusFacts {
  worstSeverity: Severity | null
  openFindings: number
  topFindingId: string | null
  atticCount: number
  loadState: UnitLoadState | null
  utilisation: number | null
  storedLb: number
  openMarks: number
  activeMarks: number
  lateReadings: number
}

/** What the section through a home is drawn from. */
export interface SectionParts { rooms: Pick<RoomFacts, 'id' | 'name' | 'lengthFt' | 'widthFt'>[], attics: AtticOfUnit[], marks: MarkOfUnit[] }

/** One unit in a list. `status` is null for those who may not see findings. */
export interface UnitCard {
  id: string
  name: string
  propertyId: string
  propertyName: string
  tenantName: string | null
  status: UnitStatusFacts | null
  section: SectionParts | null
}

export interface PropertyCard extends PropertyFacts {
  unitCount: number
  openFindings: number
  urgentFindings: number
  activeMarks: number
  storedLb: number
  overUnits: number
  /** The units that most need a look, worst first; not more than six. */
  units: UnitCard[]
}

export interface PropertyPage {
  property: PropertyFacts
  units: { rows: (UnitCard & { archivedAt: string | null })[], next: string | null }
  abilities: string[]
}

export interface UnitPage {
  unit: UnitFacts
  property: PropertyFacts
  rooms: RoomFacts[]
  archivedRooms: RoomFacts[]
  attics: AtticOfUnit[]
  tenancies: TenancyFacts[]
  status: UnitStatusFacts | null
  marks: MarkOfUnit[]
  findings: FindingOfUnit[]
  jobs: JobOfUnit[]
  recordEntries: number
  /** The organisation's day, so that server and browser agree on "now". */
  today: string
  abilities: string[]
}

export interface Page<T> { rows: T[], next: string | null }
