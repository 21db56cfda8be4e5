import { describe, expect, it } from 'vitest'
import type { Finding } from '../../../shared/types/finding'
import { compareFindings } from '../../../shared/utils/upkeep/compareFindings'
import { dueItems, type DueInput } from '../../../shared/utils/upkeep/dueItems'
import { findUnitFindings } from '../../../shared/utils/upkeep/findUnitFindings'
import { nextReading, nextReadingDueOn, type PlannedMark } from '../../../shared/utils/upkeep/readingPlan'
import { correctBy, DEFAULT_RESPONSE_POLICY, enterFrom, responseClassOf } from '../../../shared/utils/upkeep/responseTimes'

const mark: PlannedMark = { reportedOn: '2026-03-01', activity: 'too-few-readings', lastEventOn: null, closed: false }
const takenOn = (...days: string[]) => days.map(on => ({ takenOn: on }))

describe('Reading plan', () => {
  it('asks a week after a new mark, and a week after its first reading', () => {
    expect(nextReadingDueOn(mark, [], '2026-03-02')).toBe('2026-03-08')
    expect(nextReadingDueOn(mark, takenOn('2026-03-01'), '2026-03-02')).toBe('2026-03-08')
  })

  it('then after two weeks, then monthly', () => {
    expect(nextReadingDueOn(mark, takenOn('2026-03-01', '2026-03-08'), '2026-03-09')).toBe('2026-03-22')
    expect(nextReadingDueOn(mark, takenOn('2026-03-01', '2026-03-08', '2026-03-22'), '2026-03-23')).toBe('2026-04-21')
  })

  it('is weekly while active, quarterly while dormant', () => {
    const readings = takenOn('2026-01-01', '2026-02-01', '2026-03-01')
    expect(nextReadingDueOn({ ...mark, activity: 'active' }, readings, '2026-03-02')).toBe('2026-03-08')
    expect(nextReadingDueOn({ ...mark, activity: 'dormant' }, readings, '2026-03-02')).toBe('2026-05-31')
    expect(nextReadingDueOn({ ...mark, activity: 'watch' }, readings, '2026-03-02')).toBe('2026-03-31')
    expect(nextReading({ ...mark, activity: 'dormant', inTrial: true }, readings, '2026-03-02')).toMatchObject({ dueOn: '2026-03-15', reason: 'trial-fortnightly' })
    expect(nextReadingDueOn({ ...mark, activity: 'active', inTrial: true }, readings, '2026-03-02')).toBe('2026-03-08')
  })

  it('counts days late, never below zero', () => {
    expect(nextReading(mark, [], '2026-03-08')!.daysLate).toBe(0)
    expect(nextReading(mark, [], '2026-03-11')!.daysLate).toBe(3)
  })

  it('leaves out readings dated after today', () => {
    expect(nextReadingDueOn(mark, takenOn('2026-03-01', '2027-03-01'), '2026-03-02')).toBe('2026-03-08')
  })

  it('raises a mark nobody read for a week after a storm or load change', () => {
    const stormy = { ...mark, activity: 'watch' as const, lastEventOn: '2026-03-10' }
    const readings = takenOn('2026-01-01', '2026-02-01', '2026-03-01')
    expect(nextReading(stormy, readings, '2026-03-16')!.priority).toBe('usual')
    expect(nextReading(stormy, readings, '2026-03-17')!.priority).toBe('raised')
    expect(nextReading(stormy, takenOn('2026-03-12'), '2026-03-17')!.priority).toBe('usual')
  })

  it('asks nothing of a closed mark', () => {
    expect(nextReadingDueOn({ ...mark, closed: true }, [], '2026-12-01')).toBeNull()
  })

  it('refuses a day that is none', () => {
    expect(() => nextReading(mark, [], '2026-13-01')).toThrow(RangeError)
  })
})

describe('Response times', () => {
  it('are 24 h, 72 h and 30 days from receipt by default (ours; HUD NSPIRE gives 24 h and 30 days)', () => {
    expect(correctBy('danger', '2026-03-01T10:00:00Z')).toBe('2026-03-02T10:00:00.000Z')
    expect(correctBy('urgent', '2026-03-01T10:00:00Z')).toBe('2026-03-04T10:00:00.000Z')
    expect(correctBy('routine', '2026-03-01T10:00:00Z')).toBe('2026-03-31T10:00:00.000Z')
  })

  it('follow the organisation’s own policy', () => {
    const policy = { ...DEFAULT_RESPONSE_POLICY, hours: { danger: 12, urgent: 48, routine: 240 }, entryNoticeHours: 48 }
    expect(correctBy('danger', '2026-03-01T10:00:00Z', policy)).toBe('2026-03-01T22:00:00.000Z')
    expect(enterFrom('2026-03-01T10:00:00Z', policy)).toBe('2026-03-03T10:00:00.000Z')
  })

  it('entry needs 24 h of notice by default', () => {
    expect(enterFrom('2026-03-01T10:00:00Z')).toBe('2026-03-02T10:00:00.000Z')
  })

  it('a danger sign starts the shortest clock', () => {
    expect(responseClassOf({ rule: 'danger-sign', severity: 'urgent' })).toBe('danger')
    expect(responseClassOf({ rule: 'attic-load', severity: 'urgent' })).toBe('urgent')
    expect(responseClassOf({ rule: 'attic-load', severity: 'attention' })).toBe('routine')
  })

  it('refuse an instant that is none', () => {
    expect(() => correctBy('danger', 'yesterday')).toThrow(RangeError)
  })
})

describe('Due items', () => {
  const nothing: DueInput = { marks: [], attics: [], jobs: [], findings: [], invitations: [] }
  const today = '2026-06-15'

  it('are none when nothing is there or nothing has come up', () => {
    expect(dueItems(nothing, today)).toEqual([])
    expect(dueItems({ ...nothing, jobs: [{ id: 'j', unitId: 'u', dueOn: '2026-06-16' }, { id: 'k', unitId: 'u', dueOn: null }] }, today)).toEqual([])
  })

  it('hold every kind on its day', () => {
    const input: DueInput = {
      marks: [{ ...mark, id: 'm', unitId: 'u', reportedOn: '2026-06-08', readings: [] }],
      attics: [{ id: 'a', unitId: 'u', itemCount: 3, confirmedOn: '2025-06-15', inspectedOn: '2025-12-15' }],
      jobs: [{ id: 'j', unitId: 'u', dueOn: today }],
      findings: [{ id: 'f', unitId: 'u', lookAgainOn: today }, { id: 'g', unitId: 'u', lookAgainOn: null }],
      invitations: [{ id: 'v', unitId: null, expiresOn: '2026-06-17' }],
    }
    expect(dueItems(input, today).map(item => item.kind).sort()).toEqual(['inspection', 'inventory', 'invitation', 'job', 'look-again', 'reading'])
    expect(dueItems(input, '2026-06-14').map(item => item.kind)).toEqual([])
  })

  it('mention an invitation two days before it lapses and not after', () => {
    const at = (expiresOn: string) => dueItems({ ...nothing, invitations: [{ id: 'v', unitId: null, expiresOn }] }, today).length
    expect([at('2026-06-14'), at('2026-06-15'), at('2026-06-17'), at('2026-06-18')]).toEqual([0, 1, 1, 0])
  })

  it('ask nothing about the list of an empty attic', () => {
    expect(dueItems({ ...nothing, attics: [{ id: 'a', unitId: 'u', itemCount: 0, confirmedOn: '2020-01-01', inspectedOn: null }] }, today)).toEqual([])
  })

  it('put raised marks first, then the latest', () => {
    const input: DueInput = {
      ...nothing,
      marks: [{ ...mark, id: 'stormy', unitId: 'u', activity: 'watch', readings: takenOn('2026-05-01', '2026-05-20', '2026-06-01'), lastEventOn: '2026-06-05' }],
      jobs: [{ id: 'late', unitId: 'u', dueOn: '2026-06-01' }, { id: 'later', unitId: 'u', dueOn: '2026-05-01' }],
    }
    expect(dueItems(input, today).map(item => item.subjectId)).toEqual(['stormy', 'later', 'late'])
    expect(dueItems(input, today)[0]).toMatchObject({ dueOn: today, daysLate: 0, priority: 'raised' })
  })
})

describe('Unit findings', () => {
  it('a late job is graver when the matter was not routine', () => {
    const job = { id: 'j', title: 'Mend ceiling', dueOn: '2026-06-01' }
    const at = (responseClass: 'routine' | 'danger') => findUnitFindings({ unitId: 'u', today: '2026-06-03', jobs: [{ ...job, responseClass }], contactProblem: null })
    expect(at('routine')).toMatchObject([{ rule: 'job-overdue', subject: { kind: 'job', id: 'j' }, severity: 'attention', evidence: { daysLate: 2 } }])
    expect(at('danger')).toMatchObject([{ severity: 'urgent' }])
  })

  it('a job due today is not late, and a silent home is told', () => {
    const findings = findUnitFindings({ unitId: 'u', today: '2026-06-01', jobs: [{ id: 'j', title: 'x', dueOn: '2026-06-01', responseClass: 'urgent' }], contactProblem: 'address-bounced' })
    expect(findings).toMatchObject([{ rule: 'no-working-contact', subject: { kind: 'unit', id: 'u' }, evidence: { reason: 'address-bounced' } }])
  })
})

describe('Open against wanted findings', () => {
  const subject = { kind: 'attic', id: 'a' } as const
  const near: Finding = { rule: 'inventory-stale', subject, severity: 'notice', evidence: { confirmedOn: null, dueOn: '2026-01-01' }, adviceCode: 'confirm-inventory' }
  const grave: Finding = { ...near, severity: 'urgent' }
  const open = { id: 'f1', rule: near.rule, subject, severity: 'notice' as const }

  it('a new condition opens one finding', () => {
    expect(compareFindings([], [near])).toEqual([{ kind: 'open', finding: near }])
  })

  it('the same condition changes nothing', () => {
    expect(compareFindings([open], [near])).toEqual([])
  })

  it('a graver one escalates, a lesser one eases, a gone one clears', () => {
    expect(compareFindings([open], [grave])).toEqual([{ kind: 'escalate', id: 'f1', finding: grave }])
    expect(compareFindings([{ ...open, severity: 'urgent' }], [near])).toEqual([{ kind: 'ease', id: 'f1', finding: near }])
    expect(compareFindings([open], [])).toEqual([{ kind: 'clear', id: 'f1' }])
  })

  it('two wanted for one rule and subject open one, the gravest', () => {
    expect(compareFindings([], [near, grave, near])).toEqual([{ kind: 'open', finding: grave }])
  })

  it('two open for one rule and subject leave one', () => {
    expect(compareFindings([open, { ...open, id: 'f2' }], [near])).toEqual([{ kind: 'clear', id: 'f2' }])
  })

  it('another subject is another finding', () => {
    const other: Finding = { ...near, subject: { kind: 'attic', id: 'b' } }
    expect(compareFindings([open], [other])).toEqual([{ kind: 'clear', id: 'f1' }, { kind: 'open', finding: other }])
  })
})
