export const ROLES = ['owner', 'manager', 'tenant', 'trades', 'engineer'] as const
export type Role = typeof ROLES[number]

export type UnitsOfMeasure = 'us' | 'metric'

/** What a signed-in person's screens may know about them; abilities decide what is shown, never the role's name. */
export interface Me {
  user: { id: string, name: string, email: string, phone: string | null, unitsOfMeasure: UnitsOfMeasure, version: number }
  organisation: { id: string, name: string, role: Role, timeZone: string, currency: string, contactPhone: string | null, isDemo: boolean }
  organisations: { id: string, name: string, role: Role }[]
  abilities: string[]
  /** The units this person may see; null for people who see the whole portfolio. */
  unitIds: string[] | null
  /** Whether this organisation's daily digest goes to this person. */
  digest: boolean
}

/** What a mailed link to begin with would set up. */
export interface Beginning { email: string, name: string, organisationName: string, hasAccount: boolean }
