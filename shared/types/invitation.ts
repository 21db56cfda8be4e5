import type { Role } from './people'

export const INVITATION_DAYS = 14

export interface HomeName { id: string, name: string, propertyName: string }

/** One invitation that has not been accepted or taken back; `expired` ones wait to be sent again. */
export interface InvitationRow {
  id: string
  email: string
  role: Role
  unit: HomeName | null
  tenantName: string | null
  untilOn: string | null
  invitedByName: string
  createdAt: string
  expiresAt: string
  state: 'open' | 'expired'
  /** How its newest mail fares; null once that mail has been cleared away. */
  mail: 'queued' | 'sent' | 'failed' | null
}

/** What the link of an invitation shows before anything is accepted. */
export interface InvitationOffer {
  organisationName: string
  inviterName: string
  email: string
  role: Role
  unit: { name: string, propertyName: string } | null
  untilOn: string | null
  expiresAt: string
  accountExists: boolean
  /** The address of whoever is signed in on this device. */
  signedInAs: string | null
}

export interface PersonRow {
  /** Of the membership. */
  id: string
  userId: string
  name: string
  email: string
  phone: string | null
  role: Role
  /** For tenants and engineers: the homes they may see, with the last day where there is one. */
  units: (HomeName & { untilOn: string | null })[]
  joinedAt: string
  /** Whether the asker may end this membership. */
  mayEnd: boolean
}
