import type { ColumnType } from 'kysely'
import type { Day, Defaulted, Instant } from '../schema'
import type { Role } from '../../../shared/types/people'

export interface PeopleTables {
  organisation: OrganisationTable
  appUser: AppUserTable
  membership: MembershipTable
  invitation: InvitationTable
  passwordReset: PasswordResetTable
  signUp: SignUpTable
}

export interface OrganisationTable {
  id: string
  name: string
  timeZone: Defaulted<string>
  currency: Defaulted<string>
  contactPhone: string | null
  dangerResponseHours: Defaulted<number>
  urgentResponseHours: Defaulted<number>
  routineResponseDays: Defaulted<number>
  entryNoticeHours: Defaulted<number>
  reviewHour: Defaulted<number>
  seasonAllowanceMm: Defaulted<number>
  trussAllowanceMm: Defaulted<number>
  leastReadings: Defaulted<number>
  leastDays: Defaulted<number>
  pRising: Defaulted<number>
  dormantWithinMmPerYear: Defaulted<number>
  leastJumpMm: Defaulted<number>
  jumpSigmas: Defaulted<number>
  morePops: Defaulted<number>
  isDemo: Defaulted<boolean>
  lastNumber: Defaulted<number>
  createdAt: Instant
  version: Defaulted<number>
}

export interface AppUserTable {
  id: string
  email: string
  name: string
  phone: string | null
  passwordHash: string
  sessionEpoch: Defaulted<number>
  unitsOfMeasure: Defaulted<'us' | 'metric'>
  mailRefusedAt: Instant | null
  createdAt: Instant
  version: Defaulted<number>
}

export interface MembershipTable {
  id: string
  organisationId: string
  userId: string
  role: Role
  digest: Defaulted<boolean>
  lastLookedAt: Instant | null
  lookedBeforeAt: ColumnType<string | null, string | null | undefined, string | null>
  createdAt: Instant
  endedAt: Instant | null
}

export interface InvitationTable {
  id: string
  organisationId: string
  email: string
  role: Role
  unitId: string | null
  tenancyId: string | null
  /** For an engineer: the last day of access. */
  untilOn: Day | null
  sends: Defaulted<number>
  tokenHash: string
  invitedBy: string
  expiresAt: Instant
  acceptedAt: Instant | null
  revokedAt: Instant | null
  createdAt: Instant
}

export interface PasswordResetTable {
  id: string
  userId: string
  tokenHash: string
  expiresAt: Instant
  usedAt: Instant | null
  createdAt: Instant
}

export interface SignUpTable {
  id: string
  email: string
  name: string
  organisationName: string
  timeZone: string | null
  tokenHash: string
  expiresAt: Instant
  usedAt: ColumnType<string | null, string | null | undefined, string | null>
  createdAt: Instant
}
