import type { Finding } from '../../types/finding'
import type { DangerSign } from '../../types/mark'
import { formatDay, isDay } from '../days'
import { formatLoad, formatNumber, formatRate, formatShare, formatWeight, formatWidth, type UnitSystem } from '../units'
import { countWords, spanWords } from './activityMessages'
import { dangerSignsWords } from './markMessages'

export interface EvidenceRow { key: string, label: string, value: string }

type Unit = 'mm' | 'pops'
interface Reader { system: UnitSystem, unit: Unit }
type Shown = (value: never, reader: Reader) => string

const weight: Shown = (lb: number, { system }) => formatWeight(lb, system)
const load: Shown = (psf: number, { system }) => formatLoad(psf, system)
const width: Shown = (mm: number, { system }) => formatWidth(mm, system)
const amount: Shown = (value: number, { system, unit }) => unit === 'mm' ? formatWidth(value, system) : countWords(value, 'pop')
const rate: Shown = (value: number, { system, unit }) => unit === 'mm' ? formatRate(value, system) : `${formatNumber(value, 1)} pops a year`
const share: Shown = (value: number) => formatShare(value)
const count: Shown = (value: number) => formatNumber(value)
const day: Shown = (on: string) => isDay(on) ? formatDay(on) : on
const text: Shown = (words: string) => words.replaceAll('-', ' ')

/** Every number a finding keeps, by its key: what it is called and how it is written. What is not here is an id or a unit. */
const ROWS: Record<string, [label: string, shown: Shown]> = {
  totalLb: ['Stored', weight], highLb: ['Could be as much as', weight], ratedTotalLb: ['Rated in all', weight], ratedPsf: ['Rated load', load],
  utilisation: ['Share of what is allowed', share], chanceOfExceeding: ['Chance of being over', share],
  joistNumber: ['Joist', count], joistsOver: ['Joists over in all', count], label: ['What', text], pressurePsf: ['It presses', load], itemCount: ['Items', count],
  holdReasons: ['Held because of', (reasons: string[]) => reasons.map(reason => reason.replaceAll('-', ' ')).join(', ')],
  basis: ['The rating rests on', text], reason: ['Reason', text],
  confirmedOn: ['Last confirmed', day], dueOn: ['Due', day], daysLate: ['Late by', (days: number) => countWords(days, 'day')], title: ['Job', text],
  firstSeenOn: ['First seen', day], seenOn: ['Seen', day], takenOn: ['Reading of', day], since: ['Sure of the direction since', day],
  slopePerYear: ['Rate', rate],
  interval: ['Between (95 % interval)', ([low, high]: [number, number], reader) => `${rate(low as never, reader)} and ${rate(high as never, reader)}`],
  readingCount: ['From', (readings: number) => countWords(readings, 'reading')], spanDays: ['Over', (days: number) => spanWords(days)],
  value: ['This reading', amount], previous: ['Before', amount], rise: ['Rise', amount], threshold: ['Counts as sudden above', amount],
  fromClass: ['Width class before', count], toClass: ['Width class now', count], widthMm: ['Width', width],
  fromCount: ['Pops before', count], toCount: ['Pops now', count], count: ['Pops', count],
  dropMm: ['Drop', width], limitMm: ['Limit', width], spanMm: ['Span', width], divisor: ['Limit is the span over', count],
  state: ['State', text], signs: ['Signs', (signs: DangerSign[]) => dangerSignsWords(signs)],
}

/** The numbers a finding rests on, one row each, in the reader's units. */
export function evidenceRows(finding: Pick<Finding, 'evidence'>, system: UnitSystem = 'us'): EvidenceRow[] {
  const evidence = finding.evidence as unknown as Record<string, unknown>
  const unit: Unit = evidence.unit === 'pops' ? 'pops' : 'mm'
  return Object.entries(ROWS).flatMap(([key, [label, shown]]) => {
    const value = evidence[key]
    return value === undefined || value === null ? [] : [{ key, label, value: shown(value as never, { system, unit }) }]
  })
}
