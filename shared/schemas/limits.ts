import { z } from 'zod'
import { MOVEMENT_LIMITS, type LimitName } from '../types/limits'
import { version } from './fields'

function limit(name: LimitName) {
  const { least, most, isWhole } = MOVEMENT_LIMITS[name]
  const words = `From ${least} to ${most}, please.`
  return (isWhole ? z.int({ error: 'Please give a whole number.' }) : z.number({ error: 'Please give a number.' })).min(least, words).max(most, words)
}

const limits = {
  seasonAllowanceMm: limit('seasonAllowanceMm'),
  trussAllowanceMm: limit('trussAllowanceMm'),
  leastReadings: limit('leastReadings'),
  leastDays: limit('leastDays'),
  pRising: limit('pRising'),
  dormantWithinMmPerYear: limit('dormantWithinMmPerYear'),
  leastJumpMm: limit('leastJumpMm'),
  jumpSigmas: limit('jumpSigmas'),
  morePops: limit('morePops'),
}

/** Limits tried on the past, changing nothing. */
export const LimitsRehearsal = z.strictObject(limits)
export type LimitsRehearsalValue = z.output<typeof LimitsRehearsal>

export const LimitsEdit = z.strictObject({ ...limits, version })
export type LimitsEditValue = z.output<typeof LimitsEdit>
