import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { DANGER_SIGNS } from '../../../shared/types/mark'
import { SEVERITIES, type Finding } from '../../../shared/types/finding'
import type { AtticItem } from '../../../shared/types/item'
import { addDays } from '../../../shared/utils/days'
import { markTrend } from '../../../shared/utils/movement/trend'
import { compareFindings, severityRank, type OpenFinding } from '../../../shared/utils/upkeep/compareFindings'
import { findAtticFindings, type AtticJudgement } from '../../../shared/utils/upkeep/findAtticFindings'
import { findMarkFindings, type MarkJudgement } from '../../../shared/utils/upkeep/findMarkFindings'

const TODAY = '2026-12-01'

const anItem = fc.record({
  id: fc.uuid(), count: fc.integer({ min: 1, max: 9 }), base: fc.integer({ min: 1, max: 200 }), spread: fc.integer({ min: 0, max: 100 }),
  source: fc.constantFrom('catalogue' as const, 'estimate' as const, 'weighed' as const), age: fc.integer({ min: 0, max: 900 }),
  key: fc.constantFrom(null, 'piano-spinet', 'carton-of-books'),
}).map(({ id, count, base, spread, source, age, key }): AtticItem => ({
  id, atticId: 'a', catalogueKey: key, label: 'Box', category: 'boxes', count, weightSource: source, lowLb: base, typicalLb: base + spread, highLb: base + 2 * spread,
  lengthFt: 2, widthFt: 2, heightFt: 2, placement: null, owner: 'tenant', addedOn: addDays(TODAY, -age), removedOn: null, note: null,
}))

const anAttic = fc.record({
  items: fc.array(anItem, { maxLength: 6 }), ratedPsf: fc.constantFrom(0, 10, 20, 30), hold: fc.boolean(), surveyed: fc.boolean(),
  ratedTotalLb: fc.constantFrom(null, 0, 500, 4000), ages: fc.tuple(fc.option(fc.integer({ min: 0, max: 900 })), fc.option(fc.integer({ min: 0, max: 900 }))),
}).map(({ items, ratedPsf, hold, surveyed, ratedTotalLb, ages: [confirmed, inspected] }): AtticJudgement => ({
  atticId: 'a', today: TODAY, items, ratedTotalLb, load: null,
  rating: surveyed ? { ratedPsf: hold ? 0 : ratedPsf, hold, basis: hold ? 'hold' : 'class', reasons: [] } : null,
  confirmedOn: confirmed === null ? null : addDays(TODAY, -confirmed), inspectedOn: inspected === null ? null : addDays(TODAY, -inspected),
}))

function keysOf(findings: Finding[]): string[] {
  return findings.map(finding => `${finding.rule} ${finding.subject.id}`)
}

/** What stays open once the changes have been made. */
function applied(open: OpenFinding[], wanted: Finding[]): OpenFinding[] {
  const changes = compareFindings(open, wanted)
  const left = open.filter(known => !changes.some(change => change.kind === 'clear' && change.id === known.id))
    .map((known) => {
      const change = changes.find(entry => (entry.kind === 'escalate' || entry.kind === 'ease') && entry.id === known.id)
      return change && 'finding' in change ? { ...known, severity: change.finding.severity } : known
    })
  const opened = changes.flatMap((change, i) => (change.kind === 'open' ? [{ id: `new ${i}`, rule: change.finding.rule, subject: change.finding.subject, severity: change.finding.severity }] : []))
  return [...left, ...opened]
}

describe('Whatever an attic holds', () => {
  it('each rule speaks at most once', () => {
    fc.assert(fc.property(anAttic, (attic) => {
      const keys = keysOf(findAtticFindings(attic))
      expect(new Set(keys).size).toBe(keys.length)
    }))
  })

  it('no share of a rating is ever given where nothing may be stored, is on hold or was not surveyed', () => {
    fc.assert(fc.property(anAttic, (attic) => {
      if (attic.rating && !attic.rating.hold && attic.rating.ratedPsf > 0) return
      const rules = findAtticFindings(attic).map(finding => finding.rule)
      for (const rule of ['attic-load', 'attic-may-exceed', 'joist-over', 'heavy-item-in-middle']) expect(rules).not.toContain(rule)
      const told = rules.some(rule => rule === 'contents-under-hold' || rule === 'contents-without-survey' || rule === 'contents-without-storage')
      expect(told).toBe(attic.items.length > 0)
    }))
  })

  it('one more item never eases what is said about the load', () => {
    const gravest = (attic: AtticJudgement) => Math.max(-1, ...findAtticFindings(attic).filter(finding => finding.rule === 'attic-load').map(finding => severityRank(finding.severity)))
    fc.assert(fc.property(anAttic, anItem, (attic, extra) => {
      expect(gravest({ ...attic, items: [...attic.items, extra] })).toBeGreaterThanOrEqual(gravest(attic))
    }))
  })
})

describe('Whatever is open', () => {
  it('after the changes exactly the wanted findings are open, and a second run changes nothing', () => {
    fc.assert(fc.property(anAttic, anAttic, (before, after) => {
      const open = applied([], findAtticFindings(before))
      const wanted = findAtticFindings(after)
      const now = applied(open, wanted)
      expect(now.map(({ rule, severity }) => `${rule} ${severity}`).sort()).toEqual(wanted.map(({ rule, severity }) => `${rule} ${severity}`).sort())
      expect(compareFindings(now, wanted)).toEqual([])
    }))
  })

  it('severities rise in the order they are listed', () => {
    expect(SEVERITIES.map(severityRank)).toEqual([0, 1, 2])
  })
})

describe('Whatever a mark shows', () => {
  const aMark = fc.record({
    kind: fc.constantFrom('crack' as const, 'nail-pops' as const, 'sag' as const, 'stain' as const),
    readings: fc.array(fc.record({ day: fc.integer({ min: 0, max: 700 }), value: fc.integer({ min: 0, max: 40 }) }), { maxLength: 15 }),
    sign: fc.option(fc.constantFrom(...DANGER_SIGNS)), aboveLb: fc.option(fc.integer({ min: 0, max: 2000 })), span: fc.option(fc.integer({ min: 500, max: 6000 })),
  }).map(({ kind, readings, sign, aboveLb, span }): MarkJudgement => {
    const dated = readings.map(({ day, value }) => ({ takenOn: addDays('2025-01-01', day), value, sigma: 0.5 }))
    return {
      mark: { id: 'm', kind, shape: null, firstSeenOn: '2025-01-01', reportedOn: '2025-01-01' }, today: TODAY, readings: dated, trend: markTrend(dated),
      dangerSigns: sign === null ? [] : [{ sign, seenOn: '2026-11-01' }], dangerClearedOn: null, stain: null,
      loadAbove: aboveLb === null ? null : { totalLb: aboveLb, utilisation: aboveLb / 1000 }, ceilingSpanMm: span, plaster: false, morePops: 3, nextReading: null,
    }
  })

  it('each rule speaks at most once', () => {
    fc.assert(fc.property(aMark, (mark) => {
      const keys = keysOf(findMarkFindings(mark))
      expect(new Set(keys).size).toBe(keys.length)
    }))
  })

  it('a danger sign always comes first, urgent, with the advice to leave', () => {
    fc.assert(fc.property(aMark, (mark) => {
      if (mark.dangerSigns.length === 0) return
      expect(findMarkFindings(mark)[0]).toMatchObject({ rule: 'danger-sign', severity: 'urgent', adviceCode: 'leave-room-and-call' })
    }))
  })

  it('a jump of the newest reading is never passed over', () => {
    fc.assert(fc.property(aMark, (mark) => {
      if (!mark.trend.sudden) return
      expect(findMarkFindings(mark)).toContainEqual(expect.objectContaining({ rule: 'mark-sudden', severity: 'urgent' }))
    }))
  })

  it('no mark is called active on fewer than six readings or 90 days', () => {
    fc.assert(fc.property(aMark, (mark) => {
      if (mark.trend.kind === 'measured') return
      const rules = findMarkFindings(mark).map(finding => finding.rule)
      expect(rules).not.toContain('mark-active')
      expect(rules).not.toContain('sag-growing')
    }))
  })
})
