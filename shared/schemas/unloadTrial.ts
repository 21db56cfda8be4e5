import { z } from 'zod'
import { UNLOAD_TRIAL_STATES } from '../types/unloadTrial'
import { day, id, longText, pageLimit, shortText, version } from './fields'

const ids = (message: string) => z.array(id, { error: message }).min(1, message).max(200, 'At most 200, please.')
  .refine(list => new Set(list).size === list.length, 'Each one once, please.')

const plan = {
  purpose: shortText('What do you want to find out?', 500),
  plannedOn: day('On which day is it to be taken out?'),
  itemIds: ids('Choose what is to be taken out.'),
  markIds: ids('Choose at least one mark to watch.'),
}

export const UnloadTrialInput = z.strictObject(plan)
export type UnloadTrialValue = z.output<typeof UnloadTrialInput>

export const UnloadTrialEdit = z.strictObject({ ...plan, version })
export type UnloadTrialEditValue = z.output<typeof UnloadTrialEdit>

/** It has been done: these things are out since that day. */
export const UnloadingInput = z.strictObject({ unloadedOn: day('On which day was it taken out?'), itemIds: ids('Choose what was taken out.'), version })
export type UnloadingValue = z.output<typeof UnloadingInput>

export const UnloadTrialEnding = z.strictObject({ endedOn: day('On which day does the trial end?'), conclusion: longText(2000).default(''), version })
export type UnloadTrialEndingValue = z.output<typeof UnloadTrialEnding>

export const UnloadTrialsQuery = z.object({
  state: z.enum(UNLOAD_TRIAL_STATES, { error: 'There is no such state of a trial.' }).optional(),
  attic: id.optional(),
  after: z.string().max(600).optional(),
  limit: pageLimit,
})
export type UnloadTrialsFilter = z.output<typeof UnloadTrialsQuery>
