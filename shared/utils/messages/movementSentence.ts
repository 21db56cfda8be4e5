import type { MarkKind } from '../../types/mark'
import { addDays, formatDay } from '../days'
import type { LoadLink } from '../movement/loadLink'
import { TWELVE_MONTHS_DAYS } from '../movement/series'
import type { MarkTrend, MeasuredTrend } from '../movement/trend'
import { formatWeight, type UnitSystem } from '../units'
import { readingWords } from './readingMessages'
import { countWords, MOVES, rateWords, trendSentence } from './activityMessages'

/** As in seasonFit: fewer readings cannot tell a season from growth. */
const SEASON_LEAST_READINGS = 8

function movementPart(trend: MeasuredTrend, kind: MarkKind, system: UnitSystem): string {
  const rate = rateWords(kind, Math.abs(trend.slopePerYear), system)
  const move = trend.slopePerYear >= 0 ? MOVES[kind].up : MOVES[kind].down
  if (trend.activity === 'dormant') return 'No movement beyond the error of the readings for a year or more'
  if (trend.activity === 'active') return `${move} about ${rate}, sure of the direction since ${formatDay(trend.activeSince ?? trend.endOn)}`
  return `${move} about ${rate} so far, the direction is not sure`
}

/** Only what the readings can tell; the newest such change. */
function loadPart(links: readonly LoadLink[], system: UnitSystem): string | null {
  const link = links.findLast(({ verdict }) => verdict === 'began-after' || verdict === 'eased-after')
  if (!link) return null
  const weight = formatWeight(Math.abs(link.changeLb), system)
  return `${link.verdict === 'began-after' ? 'began' : 'eased'} after ${weight} ${link.changeLb > 0 ? 'were added' : 'were taken out'} on ${formatDay(link.changedOn)}`
}

function seasonPart(trend: MeasuredTrend): string | null {
  if (trend.season !== null || trend.activity === 'dormant') return null
  const fullYearOn = addDays(trend.startOn, TWELVE_MONTHS_DAYS)
  const missing = SEASON_LEAST_READINGS - trend.readingCount
  const more = missing > 0 ? ` and ${countWords(missing, 'more reading')}` : ''
  return fullYearOn > trend.endOn ? `a season cannot be ruled out before ${formatDay(fullYearOn)}${more}` : `a season cannot be ruled out without${more ? more.slice(4) : ' readings spread over the year'}`
}

/** The newest reading jumped: that goes before any trend but one that is sure already. */
function suddenPart({ sudden }: MarkTrend, kind: MarkKind, system: UnitSystem): string | null {
  return sudden && `Jumped from about ${readingWords(kind, sudden.baseline, system)} to ${readingWords(kind, sudden.value, system)}, read on ${formatDay(sudden.takenOn)}`
}

/** What moves, since when that is sure, what it followed, and what cannot be told yet: one sentence. */
export function movementSentence(trend: MarkTrend, links: readonly LoadLink[], kind: MarkKind, system: UnitSystem = 'us', today: string | null = null): string {
  const sudden = suddenPart(trend, kind, system)
  if (trend.kind === 'too few readings') return [sudden && `${sudden}.`, trendSentence(trend, kind, system, today)].filter(Boolean).join(' ')
  const parts = [movementPart(trend, kind, system), loadPart(links, system), seasonPart(trend)].filter(Boolean).join('; ')
  if (sudden && trend.activity === 'active') return `${parts}. ${sudden}.`
  return sudden ? `${sudden}. Before that and with it: ${parts.charAt(0).toLowerCase()}${parts.slice(1)}.` : `${parts}.`
}
