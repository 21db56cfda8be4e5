import { describe, expect, it } from 'vitest'
import { FINDING_RULES, type Finding } from '../../../shared/types/finding'
import { markTrend } from '../../../shared/utils/movement/trend'
import { cluesFor, CAUSE_CLUES } from '../../../shared/utils/movement/causeClues'
import { inventoryTotal } from '../../../shared/utils/goods/inventoryTotal'
import { REFUSAL_REASONS } from '../../../shared/utils/goods/refusals'
import { WIDTH_CLASSES } from '../../../shared/utils/movement/widthClass'
import { detectableSentence, loadLinkSentence, nextBestSentence, trendSentence } from '../../../shared/utils/messages/activityMessages'
import { clueSentence } from '../../../shared/utils/messages/causeMessages'
import { dueSentence } from '../../../shared/utils/messages/dueMessages'
import { ADVICE_SENTENCES, findingSentence, findingTitle, isFindingRule } from '../../../shared/utils/messages/findingMessages'
import { bandSentence, chanceSentence, refusalSentence } from '../../../shared/utils/messages/goodsMessages'
import * as markMessages from '../../../shared/utils/messages/markMessages'
import * as safety from '../../../shared/utils/messages/safety'
import { monthly } from '../movement/seeded'

const plain = (text: string) => text.replaceAll('\u00A0', ' ')
const attic = { kind: 'attic', id: 'a' } as const
const mark = { kind: 'mark', id: 'm' } as const
const growth = { slopePerYear: 2.1, interval: [1.4, 2.8] as [number, number], readingCount: 13, spanDays: 365 }

/** One finding of every rule. */
const EVERY: Finding[] = [
  { rule: 'attic-load', subject: attic, severity: 'urgent', adviceCode: 'stop-adding-and-unload', evidence: { state: 'over', totalLb: 1240, ratedTotalLb: 1000, ratedPsf: 20, utilisation: 1.24, chanceOfExceeding: 0.9 } },
  { rule: 'attic-may-exceed', subject: attic, severity: 'notice', adviceCode: 'weigh-or-count', evidence: { totalLb: 700, highLb: 1100, ratedTotalLb: 1000, chanceOfExceeding: 0.12 } },
  { rule: 'joist-over', subject: attic, severity: 'urgent', adviceCode: 'stop-adding-and-unload', evidence: { fieldId: 'f', joistNumber: 4, utilisation: 1.31, joistsOver: 1 } },
  { rule: 'item-outside-joists', subject: attic, severity: 'attention', adviceCode: 'mend-place', evidence: { itemId: 'i', label: 'Books', itemCount: 1 } },
  { rule: 'heavy-item-in-middle', subject: attic, severity: 'attention', adviceCode: 'move-to-bearing-walls', evidence: { itemId: 'i', label: 'Books', pressurePsf: 45, ratedPsf: 20, itemCount: 2 } },
  { rule: 'contents-under-hold', subject: attic, severity: 'urgent', adviceCode: 'keep-empty-until-inspected', evidence: { totalLb: 80, holdReasons: ['condition'] } },
  { rule: 'contents-without-survey', subject: attic, severity: 'attention', adviceCode: 'survey-attic', evidence: { totalLb: 80, itemCount: 2 } },
  { rule: 'contents-without-storage', subject: attic, severity: 'attention', adviceCode: 'empty-attic', evidence: { totalLb: 80, itemCount: 2, basis: 'framing' } },
  { rule: 'refused-item', subject: attic, severity: 'attention', adviceCode: 'take-out', evidence: { itemId: 'i', label: 'Piano', reason: 'too-heavy-for-any-attic', itemCount: 1 } },
  { rule: 'inventory-stale', subject: attic, severity: 'notice', adviceCode: 'confirm-inventory', evidence: { confirmedOn: '2025-01-02', dueOn: '2026-01-02' } },
  { rule: 'new-mark', subject: mark, severity: 'notice', adviceCode: 'watch-and-check-above', evidence: { firstSeenOn: '2026-03-01' } },
  { rule: 'new-mark-under-load', subject: mark, severity: 'attention', adviceCode: 'watch-and-check-above', evidence: { totalLb: 300, utilisation: 0.6, firstSeenOn: '2026-03-01' } },
  { rule: 'mark-active', subject: mark, severity: 'attention', adviceCode: 'look-then-engineer', evidence: { ...growth, since: '2026-08-01', unit: 'mm' } },
  { rule: 'mark-sudden', subject: mark, severity: 'urgent', adviceCode: 'leave-room-and-call', evidence: { value: 4, previous: 1, rise: 3, threshold: 1, takenOn: '2026-03-01', unit: 'mm' } },
  { rule: 'width-class-up', subject: mark, severity: 'notice', adviceCode: 'watch-and-check-above', evidence: { fromClass: 1, toClass: 2, widthMm: 1.4, takenOn: '2026-03-01' } },
  { rule: 'nail-pops-growing', subject: mark, severity: 'attention', adviceCode: 'look-then-engineer', evidence: { fromCount: 2, toCount: 5, takenOn: '2026-03-01' } },
  { rule: 'nail-pops-in-line', subject: mark, severity: 'attention', adviceCode: 'look-then-engineer', evidence: { count: 4, takenOn: '2026-03-01' } },
  { rule: 'sag-over-limit', subject: mark, severity: 'attention', adviceCode: 'unload-then-engineer', evidence: { dropMm: 15, limitMm: 12.5, divisor: 240, spanMm: 3000, takenOn: '2026-03-01' } },
  { rule: 'sag-growing', subject: mark, severity: 'urgent', adviceCode: 'unload-then-engineer', evidence: growth },
  { rule: 'stain-wet', subject: mark, severity: 'attention', adviceCode: 'find-the-leak', evidence: { state: 'damp', seenOn: '2026-03-01' } },
  { rule: 'danger-sign', subject: mark, severity: 'urgent', adviceCode: 'leave-room-and-call', evidence: { signs: ['bits-falling', 'board-dropping'], seenOn: '2026-03-01' } },
  { rule: 'reading-overdue', subject: mark, severity: 'notice', adviceCode: 'take-reading', evidence: { dueOn: '2026-03-01', daysLate: 9 } },
  { rule: 'inspection-overdue', subject: attic, severity: 'notice', adviceCode: 'inspect', evidence: { dueOn: '2026-03-01', daysLate: 1 } },
  { rule: 'job-overdue', subject: { kind: 'job', id: 'j' }, severity: 'attention', adviceCode: 'finish-job', evidence: { dueOn: '2026-03-01', daysLate: 3, title: 'Mend ceiling' } },
  { rule: 'no-working-contact', subject: { kind: 'unit', id: 'u' }, severity: 'notice', adviceCode: 'find-contact', evidence: { reason: 'no-address' } },
]

const SENTENCES = [
  ...EVERY.map(finding => findingSentence(finding)), ...EVERY.map(finding => findingTitle(finding)), ...Object.values(ADVICE_SENTENCES),
  ...CAUSE_CLUES.map(clueSentence), ...Object.values(safety).filter(value => typeof value === 'string'),
  ...REFUSAL_REASONS.map(reason => refusalSentence({ level: 'refuse', reason })),
]

describe('Sentences of findings', () => {
  it('exist for every rule', () => {
    expect(EVERY.map(finding => finding.rule).sort()).toEqual([...FINDING_RULES].sort())
    for (const finding of EVERY) expect(findingSentence(finding).length).toBeGreaterThan(10)
  })

  it('carry their numbers with units', () => {
    expect(plain(findingSentence(EVERY[0]!))).toBe('1,240 lb of 1,000 lb rated (20 psf): 124 %, over the rating.')
    expect(plain(findingSentence(EVERY[0]!, 'metric'))).toBe('562 kg of 454 kg rated (0.96 kPa): 124 %, over the rating.')
    expect(plain(findingSentence(EVERY.find(finding => finding.rule === 'mark-active')!, 'metric')))
      .toBe('About 2.1 mm a year, between 1.4 mm a year and 2.8 mm a year, from 13 readings over 12 months. Sure of the direction since 1 Aug 2026.')
  })

  it('never speak of a width class without its caveat', () => {
    expect(findingSentence(EVERY.find(finding => finding.rule === 'width-class-up')!)).toContain(safety.WIDTH_CLASS_CAVEAT)
    for (const width of WIDTH_CLASSES) expect(markMessages.widthClassSentence({ class: width, caveat: 'decoration-only' })).toContain('decoration only')
  })

  it('name over and near apart', () => {
    expect(findingTitle(EVERY[0]!)).toBe('Attic over its rating')
    expect(findingTitle({ rule: 'attic-load', evidence: { state: 'near' } })).toBe('Attic near its rating')
    expect(findingTitle({ rule: 'attic-load' })).toBe('Attic near or over its rating')
  })

  it('know a rule from any other text', () => {
    expect(isFindingRule('danger-sign')).toBe(true)
    expect(isFindingRule('danger')).toBe(false)
  })
})

describe('Safety', () => {
  it('danger advice says to leave, keep hands off, and mind the electricity, whole', () => {
    for (const part of [safety.LEAVE_ROOM, safety.HANDS_OFF, safety.WATER_CAUTION]) expect(ADVICE_SENTENCES['leave-room-and-call']).toContain(part)
  })

  it('unloading comes first wherever an attic is over or a sag grows', () => {
    expect(ADVICE_SENTENCES['stop-adding-and-unload']).toBe(safety.UNLOAD_FIRST)
    expect(ADVICE_SENTENCES['unload-then-engineer'].startsWith(safety.UNLOAD_FIRST)).toBe(true)
  })

  it('names code, engineer, trusses, hold and the office that decides', () => {
    expect(safety.ESTIMATE_CAVEAT).toMatch(/not an engineering assessment.*building codes.*licensed structural engineer/)
    expect(safety.TRUSS_CAUTION).toMatch(/No storage.*truss design drawings or an engineer/)
    expect(safety.HOLD_CAUTION).toMatch(/Wet, mouldy, rotten, cut, notched, cracked or sagging.*No storage until/)
    expect(safety.LEAVE_ROOM_SIGNS).toMatch(/fast-widening.*bulging.*sounds.*doors.*dripping.*electric/)
    expect(safety.RESPONSE_TIMES_CAVEAT).toContain('Local law')
    expect(safety.ATTIC_WORK).toMatch(/joists or decking only.*adder.*120 °F.*Wiring.*nails/)
  })

  it.each([
    [1977, ['asbestos', 'lead']], [1978, ['asbestos']], [1985, ['asbestos']], [1986, []], [null, ['asbestos', 'lead']],
  ])('a home built in %s is flagged for %o', (yearBuilt, codes) => {
    expect(safety.hazardCautions(yearBuilt).map(hazard => hazard.code)).toEqual(codes)
  })
})

describe('Manners', () => {
  it('there is no exclamation mark and no bare code in any sentence', () => {
    for (const sentence of SENTENCES) {
      expect(sentence).not.toMatch(/!|undefined|NaN|null/)
      expect(sentence[0]).toBe(sentence[0]!.toUpperCase())
    }
  })

  it('every choice of the report has its own words', () => {
    for (const [name, words] of Object.entries(markMessages)) {
      if (typeof words !== 'object') continue
      const texts = Object.values(words)
      expect(new Set(texts).size, name).toBe(texts.length)
    }
  })
})

describe('Sentences of a trend', () => {
  it('say how many readings are missing and until when', () => {
    expect(plain(trendSentence(markTrend(monthly(2, () => 1)), 'crack')))
      .toBe('2 readings so far. 4 more readings needed, the last not before 1 Apr 2026. Until then nobody can tell whether it moves.')
    expect(trendSentence(markTrend([]), 'crack')).toContain('more readings needed.')
    expect(trendSentence(markTrend(monthly(2, () => 1)), 'crack', 'us', '2199-01-01')).toMatch(/more readings needed\. Until then/)
  })

  it('say that time is missing when readings are not', () => {
    const days = monthly(1, () => 1)[0]!
    const week = Array.from({ length: 7 }, (_, i) => ({ ...days, takenOn: `2026-01-0${i + 1}` }))
    expect(plain(trendSentence(markTrend(week), 'crack'))).toContain('More time needed, the last not before 1 Apr 2026.')
  })

  it('give direction, rate, day, range, number and span of an active crack', () => {
    const trend = markTrend(monthly(13, years => 1 + 6 * years))
    if (trend.kind !== 'measured') throw new Error('expected a trend')
    expect(plain(trendSentence(trend, 'crack', 'metric'))).toMatch(/^Widening about 6 mm a year, sure of the direction since \d+ \w{3} 2026\. Between .* and .*, from 13 readings over 12 months\.$/)
  })

  it('say when the season cannot be told apart yet, and that direction is not sure later', () => {
    expect(trendSentence(markTrend(monthly(8, years => 1 + years)), 'sag')).toContain('not yet separable from the season')
    expect(trendSentence(markTrend(monthly(14, years => 1 - 0.3 * years, 0.5)), 'crack')).toMatch(/^Closing about .* The direction is not sure\./)
    expect(trendSentence(markTrend(monthly(14, () => 1, 0.1)), 'crack')).toMatch(/^No movement beyond the error/)
  })

  it('count pops instead of millimetres', () => {
    expect(plain(trendSentence(markTrend(monthly(13, years => 6 * years, 0.5)), 'nail-pops'))).toMatch(/^More pops about 6 pops a year/)
  })

  it('tell what could be seen and when to read next', () => {
    expect(plain(detectableSentence({ perYear: 2.4, limitedBy: 'season' }, 'crack', 'metric'))).toBe('These readings would show a steady change of 2.4 mm a year or more. A full year of readings will sharpen this.')
    expect(detectableSentence({ perYear: 2.4, limitedBy: 'readings' }, 'crack')).toContain('Sharper or more readings')
    expect(plain(nextBestSentence('2026-05-04', '2026-05-03'))).toBe('A reading on 4 May 2026 would tell most.')
    expect(nextBestSentence('2026-05-04', '2026-05-04')).toBe('A reading now would tell most.')
  })

  it('a link to a load blames nobody', () => {
    const link = { changedOn: '2026-05-04', changeLb: 300, readingsBefore: 4, readingsAfter: 5, before: null, after: null, verdict: 'began-after' } as const
    expect(plain(loadLinkSentence(link))).toBe(`Movement began after 300 lb went up on 4 May 2026 (4 readings before, 5 after). ${safety.LINK_CAVEAT}`)
    expect(plain(loadLinkSentence({ ...link, changeLb: -300, verdict: 'eased-after' }))).toContain('Movement eased after 300 lb came out')
  })
})

describe('Other sentences', () => {
  it('a total is a band, a chance a per cent', () => {
    const total = inventoryTotal([{ weightSource: 'catalogue', lowLb: 31, typicalLb: 45, highLb: 58, count: 10 }])
    expect(plain(bandSentence(total))).toMatch(/^450 lb, likely between 3\d\d lb and 5\d\d lb$/)
    expect(plain(chanceSentence(0.12))).toContain('about 12 %')
    expect(chanceSentence(0.001)).toContain('below 1 %')
  })

  it('a clue says it is one, with its source', () => {
    const [clue] = cluesFor({ kind: 'stain', place: null, shape: 'ring', wallType: null, recentEvents: ['leak'], mendedBefore: false, widestOnDayOfYear: null })
    expect(clueSentence(clue!)).toContain(safety.CLUE_CAVEAT)
    expect(clueSentence(clue!)).toContain('Source:')
  })

  it('a due day says how late it is', () => {
    expect(plain(dueSentence({ kind: 'reading', dueOn: '2026-03-01', daysLate: 3 }))).toBe('Due 1 Mar 2026, 3 days late')
    expect(plain(dueSentence({ kind: 'invitation', dueOn: '2026-03-01', daysLate: 0 }))).toBe('Lapses 1 Mar 2026')
  })
})
