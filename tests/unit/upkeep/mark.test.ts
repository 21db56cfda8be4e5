import { describe, expect, it } from 'vitest'
import { addDays } from '../../../shared/utils/days'
import type { FindingRule } from '../../../shared/types/finding'
import { markTrend } from '../../../shared/utils/movement/trend'
import { findMarkFindings, type JudgedReading, type MarkJudgement } from '../../../shared/utils/upkeep/findMarkFindings'
import { monthly, readingsOn } from '../movement/seeded'

const LONG_KNOWN = { firstSeenOn: '2025-01-01', reportedOn: '2025-01-01' }
const YOUNG = { firstSeenOn: '2024-06-01', reportedOn: '2026-01-01' }

function judge(kind: MarkJudgement['mark']['kind'], readings: JudgedReading[], changes: Partial<MarkJudgement> = {}): MarkJudgement {
  return {
    mark: { id: 'm1', kind, shape: null, ...LONG_KNOWN }, today: readings.at(-1)?.takenOn ?? '2026-06-01', readings, trend: markTrend(readings),
    dangerSigns: [], dangerClearedOn: null, stain: null, loadAbove: null, ceilingSpanMm: null, plaster: false, morePops: 3, nextReading: null, ...changes,
  }
}

function rules(judgement: MarkJudgement): FindingRule[] {
  return findMarkFindings(judgement).map(finding => finding.rule)
}

const quiet = monthly(8, () => 0.5)

describe('Findings of a mark', () => {
  it('are none for a quiet crack', () => {
    expect(findMarkFindings(judge('crack', quiet))).toEqual([])
  })

  it('are none without any reading', () => {
    expect(rules(judge('crack', []))).toEqual([])
    expect(rules(judge('sag', [], { ceilingSpanMm: 3000 }))).toEqual([])
  })

  it('of a danger sign are urgent, and say to leave the room', () => {
    const judgement = judge('crack', quiet, { dangerSigns: [{ sign: 'bits-falling', seenOn: '2026-05-01' }, { sign: 'bits-falling', seenOn: '2026-05-03' }] })
    expect(findMarkFindings(judgement)).toMatchObject([{ rule: 'danger-sign', severity: 'urgent', adviceCode: 'leave-room-and-call', evidence: { signs: ['bits-falling'], seenOn: '2026-05-03' } }])
  })

  it('of a danger sign stand until somebody has looked, and come back with a new one', () => {
    const seen = { dangerSigns: [{ sign: 'board-dropping' as const, seenOn: '2026-05-01' }] }
    expect(rules(judge('crack', quiet, { ...seen, dangerClearedOn: '2026-05-02' }))).toEqual([])
    const again = [...quiet.slice(0, -1), { ...quiet.at(-1)!, dangerSigns: ['wet-and-bulging' as const] }]
    expect(findMarkFindings(judge('crack', again, { ...seen, dangerClearedOn: '2026-05-02' }))).toMatchObject([{ evidence: { signs: ['wet-and-bulging'] } }])
  })

  it('of a sudden jump are urgent and stand for a month after it', () => {
    const jumped = readingsOn([0, 30, 60, 67], [1, 1, 1, 4])
    expect(findMarkFindings(judge('crack', jumped))).toMatchObject([{ rule: 'mark-sudden', severity: 'urgent', evidence: { value: 4, previous: 1, rise: 3 } }, { rule: 'width-class-up' }])
    const later = readingsOn([0, 30, 60, 67, 74, 81, 88], [1, 1, 1, 4, 4, 4, 4])
    expect(rules(judge('crack', later))).toContain('mark-sudden')
    const muchLater = readingsOn([0, 30, 60, 67, 74, 81, 140], [1, 1, 1, 4, 4, 4, 4])
    expect(rules(judge('crack', muchLater))).not.toContain('mark-sudden')
  })

  it('of the newest jump stand however old it is', () => {
    const jumped = readingsOn([0, 30, 60, 67], [1, 1, 1, 4])
    expect(rules(judge('crack', jumped, { today: '2026-12-01' }))).toContain('mark-sudden')
  })

  it('of an active crack are graver with an overloaded attic above, and put unloading first', () => {
    const growing = monthly(13, years => 0.2 + 0.7 * years, 0.1)
    const trend = markTrend(growing, { seasonAllowance: 0.1 })
    expect(trend.activity).toBe('active')
    expect(findMarkFindings(judge('crack', growing, { trend }))).toMatchObject([{ rule: 'mark-active', severity: 'attention', adviceCode: 'look-then-engineer' }])
    expect(findMarkFindings(judge('crack', growing, { trend, loadAbove: { totalLb: 400, utilisation: 1.3 } })))
      .toMatchObject([{ rule: 'mark-active', severity: 'urgent', adviceCode: 'unload-then-engineer', evidence: { readingCount: 13, unit: 'mm' } }])
  })

  it('of a growing sag are urgent', () => {
    const growing = monthly(13, years => 2 + 3 * years, 0.2)
    expect(findMarkFindings(judge('sag', growing))).toMatchObject([{ rule: 'sag-growing', severity: 'urgent', adviceCode: 'unload-then-engineer' }])
  })

  it('of a wider class need more than the readings’ error', () => {
    expect(rules(judge('crack', readingsOn([0, 30], [0.9, 1.2], 0.2)))).toEqual([])
    expect(findMarkFindings(judge('crack', readingsOn([0, 30], [0.7, 1.4], 0.2)))).toMatchObject([{ rule: 'width-class-up', severity: 'notice', evidence: { fromClass: 1, toClass: 2 } }])
    expect(findMarkFindings(judge('crack', readingsOn([0, 200, 400], [4.4, 4.8, 5.3], 0.2)))).toMatchObject([{ rule: 'width-class-up', severity: 'attention', evidence: { toClass: 3 } }])
  })

  it('of nail pops come with three more, or three in a row', () => {
    expect(rules(judge('nail-pops', readingsOn([0, 30], [2, 4], 0.5)))).toEqual([])
    expect(rules(judge('nail-pops', readingsOn([0, 30, 60, 90], [2, 3, 4, 5], 0.5)))).toEqual(['nail-pops-growing'])
    const row = { mark: { id: 'm1', kind: 'nail-pops' as const, shape: 'bumps-in-a-row' as const, ...LONG_KNOWN } }
    expect(rules(judge('nail-pops', readingsOn([0], [3], 0.5), row))).toEqual(['nail-pops-in-line'])
    expect(rules(judge('nail-pops', readingsOn([0], [2], 0.5), row))).toEqual([])
  })

  it.each([
    [12.4, false, []], [12.6, false, ['attention', 240]], [25.1, false, ['urgent', 240]], [8.4, true, ['attention', 360]], [8.3, true, []],
  ])('of a %f mm sag over 3,000 mm (plaster %s) are %o', (drop, plaster, expected) => {
    const [finding] = findMarkFindings(judge('sag', readingsOn([0], [drop], 1), { ceilingSpanMm: 3000, plaster }))
    expect(finding?.rule === 'sag-over-limit' ? [finding.severity, finding.evidence.divisor] : []).toEqual(expected)
  })

  it('of a sag take the span of its string before the room’s', () => {
    const reading = [{ ...readingsOn([0], [6], 1)[0]!, spanMm: 1200 }]
    expect(findMarkFindings(judge('sag', reading, { ceilingSpanMm: 4000 }))).toMatchObject([{ rule: 'sag-over-limit', evidence: { limitMm: 5, spanMm: 1200 } }])
  })

  it('of a stain follow the newest word on it', () => {
    expect(findMarkFindings(judge('stain', [], { stain: { state: 'dripping', seenOn: '2026-01-01' } }))).toMatchObject([{ rule: 'stain-wet', severity: 'urgent', adviceCode: 'leave-room-and-call' }])
    const damp = [{ ...readingsOn([10], [80], 10)[0]!, stain: 'damp' as const }]
    expect(findMarkFindings(judge('stain', damp, { stain: { state: 'dripping', seenOn: '2026-01-01' } }))).toMatchObject([{ severity: 'attention', evidence: { state: 'damp', seenOn: '2026-01-11' }, adviceCode: 'find-the-leak' }])
    const dry = [{ ...readingsOn([10], [80], 10)[0]!, stain: 'dry' as const }]
    expect(rules(judge('stain', dry, { stain: { state: 'dripping', seenOn: '2026-01-01' } }))).toEqual([])
  })

  it('of a new mark stand until it is read on a later day, counted from the report and not from when it was first seen', () => {
    const mark = { id: 'm1', kind: 'crack' as const, shape: null, ...YOUNG }
    expect(findMarkFindings(judge('crack', readingsOn([0], [1]), { mark }))).toMatchObject([{ rule: 'new-mark', severity: 'notice', evidence: { firstSeenOn: '2024-06-01' } }])
    expect(rules(judge('crack', [], { mark, today: '2026-01-05' }))).toEqual(['new-mark'])
    expect(rules(judge('crack', readingsOn([0, 7], [1, 1]), { mark }))).toEqual([])
    expect(rules(judge('crack', readingsOn([0], [1]), { mark, today: addDays('2026-01-01', 91) }))).toEqual([])
  })

  it('of a new mark look at what is above it', () => {
    const mark = { id: 'm1', kind: 'crack' as const, shape: null, ...YOUNG }
    const young = readingsOn([0, 20], [1, 1])
    expect(rules(judge('crack', young, { mark, loadAbove: { totalLb: 49, utilisation: 0.1 } }))).toEqual([])
    expect(findMarkFindings(judge('crack', young, { mark, loadAbove: { totalLb: 300, utilisation: null } }))).toMatchObject([{ rule: 'new-mark-under-load', severity: 'attention' }])
    expect(findMarkFindings(judge('crack', young, { mark, loadAbove: { totalLb: 300, utilisation: 1.2 } }))).toMatchObject([{ severity: 'urgent', adviceCode: 'unload-then-engineer' }])
    expect(rules(judge('crack', young, { mark, today: addDays('2026-01-01', 91), loadAbove: { totalLb: 300, utilisation: 1.2 } }))).toEqual([])
  })

  it('of a late reading come after a week’s grace, graver when it matters more', () => {
    const late = { dueOn: '2026-05-01', reason: 'monthly', daysLate: 8, priority: 'usual' } as const
    expect(rules(judge('crack', quiet, { nextReading: { ...late, daysLate: 7 } }))).toEqual([])
    expect(findMarkFindings(judge('crack', quiet, { nextReading: late }))).toMatchObject([{ rule: 'reading-overdue', severity: 'notice' }])
    expect(findMarkFindings(judge('crack', quiet, { nextReading: { ...late, priority: 'raised' } }))).toMatchObject([{ severity: 'attention' }])
    expect(findMarkFindings(judge('crack', quiet, { nextReading: { ...late, reason: 'active-weekly' } }))).toMatchObject([{ severity: 'attention' }])
  })
})
