import { z } from 'zod'
import { EmailInput, NewPasswordInput, PersonNameInput } from './account'
import { day } from './fields'
import { ROLES, type Role } from '../types/people'

const Fields = z.strictObject({
  email: EmailInput,
  role: z.enum(ROLES, 'What will this person do here?'),
  unitId: z.uuid('Which home is it about?').nullable().default(null),
  /** An existing tenancy, or null to make one from the three fields after it. */
  tenancyId: z.uuid('Choose a tenancy.').nullable().default(null),
  tenantName: z.string().trim().max(160, 'Use at most 160 characters.').nullable().default(null),
  startsOn: day('On which day does the tenancy start?').nullable().default(null),
  endsOn: day().nullable().default(null),
  untilOn: day('Until which day may the engineer see this home?').nullable().default(null),
})

/** Held against half-filled values too, so that everything wrong is told in one go. */
type Draft = Partial<z.input<typeof Fields>>

const rule = (field: keyof Draft, message: string, holds: (draft: Draft) => boolean) =>
  [(draft: Draft) => holds(draft), { path: [field] as PropertyKey[], message, when: ({ value }: { value: unknown }) => typeof value === 'object' && value !== null }] as const

const isForUnit = ({ role }: Draft) => role === 'tenant' || role === 'engineer'
const makesTenancy = ({ role, tenancyId }: Draft) => role === 'tenant' && !tenancyId

export const InvitationInput = Fields
  .refine(...rule('unitId', 'Which home is it about?', draft => !isForUnit(draft) || Boolean(draft.unitId)))
  .refine(...rule('tenantName', 'In whose name is the tenancy?', draft => !makesTenancy(draft) || Boolean(draft.tenantName?.trim())))
  .refine(...rule('startsOn', 'On which day does the tenancy start?', draft => !makesTenancy(draft) || Boolean(draft.startsOn)))
  .refine(...rule('endsOn', 'The last day comes before the first.', draft => !draft.startsOn || !draft.endsOn || draft.endsOn >= draft.startsOn))
  .refine(...rule('untilOn', 'Until which day may the engineer see this home?', draft => draft.role !== 'engineer' || Boolean(draft.untilOn)))
export type Invitation = z.output<typeof InvitationInput>

/** New people set a name and a password; people who have an account send neither. */
export const NewcomerInput = z.strictObject({ name: PersonNameInput, password: NewPasswordInput })
export const AcceptInput = NewcomerInput.partial()
export type Acceptance = z.output<typeof AcceptInput>

export const PeopleQuery = z.object({
  search: z.string().trim().max(200, 'Use at most 200 characters.').optional(),
  role: z.enum(ROLES, 'Choose one of the roles.').optional(),
  after: z.string().max(600).optional(),
})
export const InvitationsQuery = PeopleQuery.omit({ role: true })
export type PeopleFilter = { search?: string, role?: Role, after?: string }
