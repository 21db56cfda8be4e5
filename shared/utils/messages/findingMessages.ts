import { FINDING_RULES, type AdviceCode, type Finding, type FindingOf, type FindingRule, type Severity } from '../../types/finding'
import { formatDay } from '../days'
import { formatLoad, formatNumber, formatShare, formatWeight, formatWidth, NO_BREAK_SPACE, formatRate, type UnitSystem } from '../units'
import { countWords, spanWords } from './activityMessages'
import { dangerSignsWords } from './markMessages'
import { HANDS_OFF, LEAVE_ROOM, UNLOAD_FIRST, WATER_CAUTION, WIDTH_CLASS_CAVEAT } from './safety'

export const SEVERITY_WORDS: Record<Severity, string> = { notice: 'Notice', attention: 'Needs attention', urgent: 'Urgent' }

export const FINDING_TITLES: Record<FindingRule, string> = {
  'attic-load': 'Attic near or over its rating',
  'attic-may-exceed': 'Attic may exceed its rating',
  'joist-over': 'A joist carries too much',
  'item-outside-joists': 'Stored outside the measured joists',
  'heavy-item-in-middle': 'Heavy item in the middle of the span',
  'contents-under-hold': 'Things stored while the rating is on hold',
  'contents-without-survey': 'Things stored in an attic nobody has surveyed',
  'contents-without-storage': 'Things stored where nothing may be stored',
  'refused-item': 'Something that does not belong in an attic',
  'inventory-stale': 'List of stored things not confirmed for a year',
  'new-mark': 'New mark reported',
  'new-mark-under-load': 'New mark under a loaded attic',
  'mark-active': 'Mark is active',
  'mark-sudden': 'Sudden change of a mark',
  'width-class-up': 'Crack reached a wider class',
  'nail-pops-growing': 'More nail pops',
  'nail-pops-in-line': 'Nail pops in a line',
  'sag-over-limit': 'Sag beyond its limit',
  'sag-growing': 'Sag is growing',
  'stain-wet': 'Wet stain',
  'danger-sign': 'Danger sign reported',
  'reading-overdue': 'Reading overdue',
  'inspection-overdue': 'Inspection overdue',
  'job-overdue': 'Job overdue',
  'no-working-contact': 'Nobody in the home can be reached',
}

type Sentence<R extends FindingRule> = (evidence: FindingOf<R>['evidence'], system: UnitSystem) => string

function amountWords(value: number, unit: 'mm' | 'pops', system: UnitSystem): string {
  return unit === 'mm' ? formatWidth(value, system) : countWords(value, 'pop')
}

function rateOf(value: number, unit: 'mm' | 'pops', system: UnitSystem): string {
  return unit === 'mm' ? formatRate(value, system) : `${formatNumber(value, 1)}${NO_BREAK_SPACE}pops a year`
}

function growthWords(e: { slopePerYear: number, interval: [number, number], readingCount: number, spanDays: number }, unit: 'mm' | 'pops', system: UnitSystem): string {
  const [low, high] = e.interval
  return `About ${rateOf(e.slopePerYear, unit, system)}, between ${rateOf(low, unit, system)} and ${rateOf(high, unit, system)}, from ${countWords(e.readingCount, 'reading')} over ${spanWords(e.spanDays)}.`
}

const CONTACT_REASONS = {
  'no-address': 'No address to write to.', 'address-bounced': 'Mail to the address comes back.', 'no-tenancy': 'Nobody is recorded as living there.',
} as const

const ATTIC_SENTENCES: Pick<{ [R in FindingRule]: Sentence<R> },
  'attic-load' | 'attic-may-exceed' | 'joist-over' | 'item-outside-joists' | 'heavy-item-in-middle' | 'contents-under-hold' | 'contents-without-survey'
  | 'contents-without-storage' | 'refused-item' | 'inventory-stale' | 'inspection-overdue'> = {
  'attic-load': (e, s) => `${formatWeight(e.totalLb, s)} of ${formatWeight(e.ratedTotalLb, s)} rated (${formatLoad(e.ratedPsf, s)}): ${formatShare(e.utilisation)}, ${e.state} the rating.`,
  'attic-may-exceed': (e, s) => `${formatWeight(e.totalLb, s)} of ${formatWeight(e.ratedTotalLb, s)} rated, but the weights are uncertain: it may be ${formatWeight(e.highLb, s)}. Chance of being over: ${formatShare(e.chanceOfExceeding)}.`,
  'item-outside-joists': e => `${e.label} is entered where the survey has no joists, so nobody can say what it does to the ceiling. ${countWords(e.itemCount, 'item')} like this.`,
  'joist-over': e => `Joist ${e.joistNumber} is at ${formatShare(e.utilisation)} of what the rating allows. ${countWords(e.joistsOver, 'joist')} over in all.`,
  'heavy-item-in-middle': (e, s) => `${e.label} presses ${formatLoad(e.pressurePsf, s)} in the middle half of the span; the rating is ${formatLoad(e.ratedPsf, s)}. ${countWords(e.itemCount, 'item')} like this.`,
  'contents-under-hold': (e, s) => `${formatWeight(e.totalLb, s)} is up there while the rating is on hold.`,
  'contents-without-survey': (e, s) => `${formatWeight(e.totalLb, s)} in ${countWords(e.itemCount, 'item')}, and nobody has recorded what the attic can hold.`,
  'contents-without-storage': (e, s) => `${formatWeight(e.totalLb, s)} in ${countWords(e.itemCount, 'item')}, in an attic rated for no storage.`,
  'refused-item': e => `${e.label} should not be in an attic. ${countWords(e.itemCount, 'item')} like this.`,
  'inventory-stale': e => e.confirmedOn === null
    ? `Nobody has confirmed the list yet. It was due on ${formatDay(e.dueOn)}.`
    : `Last confirmed on ${formatDay(e.confirmedOn)}, due on ${formatDay(e.dueOn)}.`,
  'inspection-overdue': e => `Due on ${formatDay(e.dueOn)}, ${countWords(e.daysLate, 'day')} ago.`,
}

const MARK_SENTENCES: Omit<{ [R in FindingRule]: Sentence<R> }, keyof typeof ATTIC_SENTENCES> = {
  'new-mark': e => `First seen on ${formatDay(e.firstSeenOn)}. One reading alone cannot show a direction.`,
  'new-mark-under-load': (e, s) => `First seen on ${formatDay(e.firstSeenOn)}, with ${formatWeight(e.totalLb, s)} stored above${e.utilisation === null ? '' : ` (${formatShare(e.utilisation)} of the rating)`}.`,
  'mark-active': (e, s) => `${growthWords(e, e.unit, s)} Sure of the direction since ${formatDay(e.since)}.`,
  'mark-sudden': (e, s) => `${amountWords(e.value, e.unit, s)} on ${formatDay(e.takenOn)}, up by ${amountWords(e.rise, e.unit, s)} from ${amountWords(e.previous, e.unit, s)}. More than ${amountWords(e.threshold, e.unit, s)} counts as sudden.`,
  'width-class-up': (e, s) => `${formatWidth(e.widthMm, s)} on ${formatDay(e.takenOn)}: from class ${e.fromClass} to class ${e.toClass}. ${WIDTH_CLASS_CAVEAT}`,
  'nail-pops-growing': e => `${formatNumber(e.fromCount)} before, ${formatNumber(e.toCount)} on ${formatDay(e.takenOn)}.`,
  'nail-pops-in-line': e => `${countWords(e.count, 'pop')} in a line on ${formatDay(e.takenOn)}. The board may be letting go.`,
  'sag-over-limit': (e, s) => `${formatWidth(e.dropMm, s)} on ${formatDay(e.takenOn)}; the span over ${e.divisor} is ${formatWidth(e.limitMm, s)}.`,
  'sag-growing': (e, s) => growthWords(e, 'mm', s),
  'stain-wet': e => `Seen ${e.state} on ${formatDay(e.seenOn)}.`,
  'danger-sign': e => `Reported on ${formatDay(e.seenOn)}: ${dangerSignsWords(e.signs)}.`,
  'reading-overdue': e => `Due on ${formatDay(e.dueOn)}, ${countWords(e.daysLate, 'day')} ago.`,
  'job-overdue': e => `${e.title}: due on ${formatDay(e.dueOn)}, ${countWords(e.daysLate, 'day')} ago.`,
  'no-working-contact': e => CONTACT_REASONS[e.reason],
}

const SENTENCES: { [R in FindingRule]: Sentence<R> } = { ...ATTIC_SENTENCES, ...MARK_SENTENCES }

export const ADVICE_SENTENCES: Record<AdviceCode, string> = {
  'stop-adding-and-unload': UNLOAD_FIRST,
  'stop-adding': 'Stop adding. Put nothing more up before something comes out.',
  'weigh-or-count': 'Weigh the big boxes, or look inside them: books, paper, tools, tile and liquids weigh most.',
  'mend-place': 'Enter where it really stands, or measure the joists there. Until then take it as too much.',
  'move-to-bearing-walls': 'Move it over or beside a bearing wall, or out of the attic.',
  'keep-empty-until-inspected': 'Add nothing. Take things out where that is safe, and have the attic inspected.',
  'survey-attic': 'Survey the attic. Until then nothing more should go up.',
  'empty-attic': 'Take the things out. Only an engineer’s figure or the truss drawings can allow storage here.',
  'take-out': 'Take it out of the attic.',
  'confirm-inventory': 'Look through the list and confirm it.',
  'watch-and-check-above': 'Read the mark as planned, and check what lies above it.',
  'unload-then-engineer': `${UNLOAD_FIRST} Then have a licensed engineer look.`,
  'leave-room-and-call': `${LEAVE_ROOM} ${HANDS_OFF} ${WATER_CAUTION}`,
  'look-then-engineer': 'Look at the ceiling and at what is above. Ask a licensed engineer if it goes on.',
  'find-the-leak': `Find and stop the leak. Keep the room’s lights off while the ceiling is wet. ${WATER_CAUTION}`,
  'take-reading': 'Take the reading, or ask for it.',
  'inspect': 'Inspect the attic and the ceilings under it.',
  'finish-job': 'Finish the job, or record why it waits.',
  'find-contact': 'Find an address or number that works.',
}

function sentenceOf<R extends FindingRule>(finding: FindingOf<R>, system: UnitSystem): string {
  return SENTENCES[finding.rule](finding.evidence, system)
}

/** Why the finding stands, in words and numbers. */
export function findingSentence(finding: Finding, system: UnitSystem = 'us'): string {
  return sentenceOf(finding, system)
}

/** 'Attic over its rating' rather than 'near or over' where the evidence tells. */
export function findingTitle(finding: Pick<Finding, 'rule'> & { evidence?: unknown }): string {
  const evidence = finding.evidence
  if (finding.rule === 'attic-load' && typeof evidence === 'object' && evidence !== null && 'state' in evidence) {
    return evidence.state === 'over' ? 'Attic over its rating' : 'Attic near its rating'
  }
  return FINDING_TITLES[finding.rule]
}

export function isFindingRule(text: string): text is FindingRule {
  return FINDING_RULES.some(rule => rule === text)
}
