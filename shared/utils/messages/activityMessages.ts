import type { Activity, MarkKind } from '../../types/mark'
import { formatDay } from '../days'
import type { LoadLink } from '../movement/loadLink'
import type { DetectableRate } from '../movement/detectableRate'
import { DAYS_PER_YEAR } from '../movement/series'
import type { MarkTrend, MeasuredTrend, TooFewReadings } from '../movement/trend'
import { formatNumber, formatRate, formatWeight, NO_BREAK_SPACE, type UnitSystem } from '../units'
import { LINK_CAVEAT } from './safety'

export const ACTIVITY_WORDS: Record<Activity, string> = {
  'too-few-readings': 'Too few readings', 'dormant': 'Dormant', 'watch': 'Watch', 'active': 'Active',
}

export const MOVES: Record<MarkKind, { up: string, down: string }> = {
  'crack': { up: 'Widening', down: 'Closing' },
  'nail-pops': { up: 'More pops', down: 'Fewer pops' },
  'sag': { up: 'Dropping', down: 'Rising' },
  'stain': { up: 'Spreading', down: 'Shrinking' },
}

/** '1 reading', '3 readings'. */
export function countWords(count: number, one: string, many = `${one}s`): string {
  return `${formatNumber(count)}${NO_BREAK_SPACE}${count === 1 ? one : many}`
}

export function spanWords(days: number): string {
  return days < 60 ? countWords(days, 'day') : countWords(Math.round(days / (DAYS_PER_YEAR / 12)), 'month')
}

export function rateWords(kind: MarkKind, perYear: number, system: UnitSystem): string {
  return kind === 'nail-pops' ? `${formatNumber(perYear, 1)}${NO_BREAK_SPACE}pops a year` : formatRate(perYear, system)
}

function tooFewSentence(trend: TooFewReadings, today: string | null): string {
  const have = `${countWords(trend.readingCount, 'reading')} so far.`
  const missing = trend.missing > 0 ? ` ${countWords(trend.missing, 'more reading', 'more readings')} needed` : ' More time needed'
  const until = trend.enoughOn === null || (today !== null && trend.enoughOn <= today) ? '' : `, the last not before ${formatDay(trend.enoughOn)}`
  return `${have}${missing}${until}. Until then nobody can tell whether it moves.`
}

export function rangeSentence(trend: MeasuredTrend, kind: MarkKind, system: UnitSystem): string {
  const [low, high] = trend.interval
  return `Between ${rateWords(kind, low, system)} and ${rateWords(kind, high, system)}, from ${countWords(trend.readingCount, 'reading')} over ${spanWords(trend.spanDays)}.`
}

function directionSentence(trend: MeasuredTrend, kind: MarkKind, system: UnitSystem): string {
  const rate = rateWords(kind, Math.abs(trend.slopePerYear), system)
  const move = trend.slopePerYear >= 0 ? MOVES[kind].up : MOVES[kind].down
  if (trend.activity === 'active') return `${move} about ${rate}, sure of the direction since ${formatDay(trend.activeSince ?? trend.endOn)}.`
  if (trend.activity === 'dormant') return 'No movement beyond the error of the readings for a year or more.'
  return trend.season === null
    ? `${move} about ${rate} so far, but not yet separable from the season.`
    : `${move} about ${rate} so far. The direction is not sure.`
}

const seasonSentence = ({ seasonRuledOutFrom }: MeasuredTrend) =>
  seasonRuledOutFrom === null ? '' : ` A season cannot be ruled out before ${formatDay(seasonRuledOutFrom)}.`

/** What the readings say, with rate, range, number and span; or that they do not say it yet, and when they will. */
export function trendSentence(trend: MarkTrend, kind: MarkKind, system: UnitSystem = 'us', today: string | null = null): string {
  if (trend.kind === 'too few readings') return tooFewSentence(trend, today)
  return `${directionSentence(trend, kind, system)} ${rangeSentence(trend, kind, system)}${seasonSentence(trend)}`
}

export function detectableSentence(detectable: DetectableRate, kind: MarkKind, system: UnitSystem = 'us'): string {
  const why = detectable.limitedBy === 'season' ? 'A full year of readings will sharpen this.' : 'Sharper or more readings will lower this.'
  return `These readings would show a steady change of ${rateWords(kind, detectable.perYear, system)} or more. ${why}`
}

/** A best day that has gone by is today. */
export function nextBestSentence(nextBestOn: string, today: string): string {
  return nextBestOn <= today ? 'A reading now would tell most.' : `A reading on ${formatDay(nextBestOn)} would tell most.`
}

const LINK_WORDS: Record<LoadLink['verdict'], string> = {
  'began-after': 'Movement began after', 'eased-after': 'Movement eased after',
  'no-change': 'No change in movement after', 'cannot-tell': 'Cannot tell yet whether movement changed after',
}

export function loadLinkSentence(link: LoadLink, system: UnitSystem = 'us'): string {
  const change = `${formatWeight(Math.abs(link.changeLb), system)} ${link.changeLb > 0 ? 'went up' : 'came out'}`
  const counts = `${countWords(link.readingsBefore, 'reading')} before, ${formatNumber(link.readingsAfter)} after`
  return `${LINK_WORDS[link.verdict]} ${change} on ${formatDay(link.changedOn)} (${counts}). ${LINK_CAVEAT}`
}
