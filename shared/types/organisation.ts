export interface OrganisationSettings {
  id: string
  name: string
  timeZone: string
  currency: string
  contactPhone: string | null
  dangerResponseHours: number
  urgentResponseHours: number
  routineResponseDays: number
  entryNoticeHours: number
  reviewHour: number
  seasonAllowanceMm: number
  isDemo: boolean
  version: number
  abilities: string[]
}
