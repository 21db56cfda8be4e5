import type { CodeBasis } from '../../../shared/types/attic'
import type { Day, Defaulted, Instant, Json } from '../schema'

export interface HomeTables {
  property: PropertyTable
  unit: UnitTable
  tenancy: TenancyTable
  tenancyPerson: TenancyPersonTable
  unitAccess: UnitAccessTable
  room: RoomTable
}

export interface PropertyTable {
  id: string
  organisationId: string
  name: string
  addressLines: Defaulted<string[]>
  yearBuilt: number | null
  notes: Defaulted<string>
  codeBasis: Json<CodeBasis> | null
  archivedAt: Instant | null
  createdAt: Instant
  version: Defaulted<number>
}

export interface UnitTable {
  id: string
  organisationId: string
  propertyId: string
  name: string
  notes: Defaulted<string>
  accessNotes: Defaulted<string>
  archivedAt: Instant | null
  createdAt: Instant
  version: Defaulted<number>
}

export interface TenancyTable {
  id: string
  organisationId: string
  unitId: string
  tenantName: string
  startsOn: Day
  endsOn: Day | null
  notes: Defaulted<string>
  createdAt: Instant
  version: Defaulted<number>
}

export interface TenancyPersonTable {
  tenancyId: string
  organisationId: string
  userId: string
}

export interface UnitAccessTable {
  id: string
  organisationId: string
  unitId: string
  userId: string
  untilOn: Day | null
  createdAt: Instant
}

export interface RoomTable {
  id: string
  organisationId: string
  unitId: string
  name: string
  isBedroom: Defaulted<boolean>
  lengthFt: number | null
  widthFt: number | null
  ceilingHeightIn: number | null
  ceilingFinish: Defaulted<string>
  sort: Defaulted<number>
  archivedAt: Instant | null
  createdAt: Instant
  version: Defaulted<number>
}
