import { z } from 'zod'
import { day, longText, shortText, version } from './fields'

const tenancy = {
  tenantName: shortText('Who lives here?', 160),
  startsOn: day('On which day does it start?'),
  endsOn: day().nullable(),
  notes: longText(2000),
}
const inOrder = (value: { startsOn: string, endsOn: string | null }) => value.endsOn === null || value.endsOn >= value.startsOn
const order = { path: ['endsOn'], message: 'The last day comes before the first.' }

export const TenancyCreate = z.strictObject({
  ...tenancy, endsOn: tenancy.endsOn.default(null), notes: tenancy.notes.default(''),
}).refine(inOrder, order)
export const TenancyEdit = z.strictObject({ ...tenancy, version }).refine(inOrder, order)

export type TenancyCreateValue = z.output<typeof TenancyCreate>
export type TenancyEditValue = z.output<typeof TenancyEdit>
