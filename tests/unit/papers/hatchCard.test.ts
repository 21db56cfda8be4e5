import { describe, expect, it } from 'vitest'
import type { AtticDocument, AtticSurvey, JoistField } from '../../../shared/types/attic'
import type { ContentsItem } from '../../../shared/types/item'
import { emptyJoistField, emptySurvey } from '../../../shared/utils/attic/emptySurvey'
import { judgeContents } from '../../../shared/utils/attic/judgeContents'
import { hatchCardText } from '../../../shared/utils/messages/hatchCardMessages'
import { ATTIC_WORK, ESTIMATE_CAVEAT, HOLD_CAUTION, TRUSS_CAUTION, UNLOAD_FIRST } from '../../../shared/utils/messages/safety'
import { hatchCardFacts, strictestRows } from '../../../shared/utils/papers/hatchCard'
import { isHeavyInMiddle, judgeLoadPlan } from '../../../shared/utils/structure/judgeLoadPlan'
import { loadFieldOf } from '../../../shared/utils/structure/loadField'
import type { UnitSystem } from '../../../shared/utils/units'

const joists: JoistField = { ...emptyJoistField('Main'), species: 'Douglas fir-larch', grade: 'No.2', size: '2x8', spacingIn: 16, spanFt: 12, joistCount: 16, bearingLengthIn: 3.5, topEdgeBraced: true }
const sound: AtticSurvey = {
  ...emptySurvey('2027-03-14'), framing: 'rafters-and-joists', access: 'pull-down-ladder', openingWidthIn: 24, openingLengthIn: 54, clearHeightIn: 60, habitable: false,
  ceilingFinish: 'gypsum-half-inch', insulation: { material: 'fiberglass', depthIn: 3 }, deck: 'full', conditions: [], joistFields: [joists],
}
const boxes = (typicalLb: number, xFt = 0): ContentsItem => ({ id: 'boxes', fieldNumber: 1, quantity: 1, lowLb: typicalLb, typicalLb, highLb: typicalLb, weightSource: 'weighed', xFt, yFt: 4, lengthFt: 2, widthFt: 2 })
const contact = { organisationName: 'Plumbline Homes', phone: '+1 555 0134' }

function card(survey: AtticSurvey | null, { documents = [], items = [], system = 'us' }: { documents?: AtticDocument[], items?: ContentsItem[], system?: UnitSystem } = {}) {
  const facts = hatchCardFacts({ survey, contents: judgeContents({ survey, documents, items }) }, system)
  return { facts, text: hatchCardText(facts, contact, system, '2027-05-02') }
}

const drawing: AtticDocument = { kind: 'truss-drawing', writtenOn: '2020-02-02', writtenBy: 'Ł. Wąs, PE', attached: true, ratedPsf: 10, liftsHold: false, coversWholeAttic: true, area: '' }

describe('the hatch card of sound joists', () => {
  it('gives the rating, the heaviest box by distance, the whole load, the days and whom to ask', () => {
    const { text } = card(sound)
    expect(text).toMatchObject({ word: 'Light things only', says: 'At most 20\u00A0psf, spread out.', isBarred: false, noTable: null })
    // 200 lb is our limit for any one box; 20 psf on 18 in square is 45 lb.
    expect(text.table?.rows).toEqual([{ place: 'up to 2\u00A0ft', weights: ['200\u00A0lb'] }, { place: 'out to the middle', weights: ['45\u00A0lb'] }])
    expect(text.table?.notes).toContain('Main: all together at most 4,800\u00A0lb, spread out.')
    expect(text.fields).toMatchObject([{ quarter: '3\u00A0ft', half: '6\u00A0ft', joistCount: 16 }])
    expect(text.dates).toBe('Surveyed 14\u00A0Mar\u00A02027. Card of 2\u00A0May\u00A02027. On that day nothing was stored. A newer card replaces this one.')
    expect(text.ask).toBe('Ask first: Plumbline Homes, +1 555 0134')
    expect(text.cautions).toEqual(expect.arrayContaining([ESTIMATE_CAVEAT, expect.stringContaining(ATTIC_WORK)]))
  })

  it('never allows a box that the load plan itself calls over or too dense in the middle', () => {
    const weak = { ...sound, joistFields: [{ ...joists, size: '2x6' as const, spanFt: 15, grade: 'no stamp' as const, spacingIn: 24 }] }
    const { facts } = card(weak)
    const answer = loadFieldOf(weak, weak.joistFields[0]!, facts.ratedPsf!)
    if (answer.kind !== 'field') return expect.fail(answer.kind)
    const side = facts.boxSideFt
    for (const { toFt, weightLb } of facts.fields[0]!.rows!) {
      for (const middleFt of [Math.max(side / 2, toFt - 0.99), toFt]) {
        const box = { id: 'box', weightLb, xFt: middleFt - side / 2, yFt: 6 - side / 2, lengthFt: side, widthFt: side }
        const plan = judgeLoadPlan(answer.field, [box], { member: answer.member })
        expect(plan.kind === 'judged' && plan.utilisation).toBeLessThanOrEqual(1)
        expect(isHeavyInMiddle(answer.field, box)).toBe(false)
      }
    }
  })

  it('speaks metric to those who read metric, in half metres and whole steps of 2 kg', () => {
    const { text } = card(sound, { system: 'metric' })
    expect(text.says).toContain('0.96\u00A0kPa')
    expect(text.table?.rows).toEqual([{ place: 'up to 0.5\u00A0m', weights: ['90\u00A0kg'] }, { place: 'out to the middle', weights: ['18\u00A0kg'] }])
    expect(text.table?.notes[0]).toContain('45 cm square')
    expect(text.why.join(' ')).toMatch(/the code asks 0\.96 kPa.*can take 2\.\d+ kPa/)
    expect(JSON.stringify(text)).not.toMatch(/\d (psf|lb|ft|in)\b/)
  })

  it('gives the strictest figure where several fields differ, and names those it does not draw', () => {
    const fields = [joists, { ...joists, name: 'Wing', spanFt: 14, size: '2x6' as const }, { ...joists, name: 'Porch', spanFt: 8 }]
    const { facts, text } = card({ ...sound, joistFields: fields })
    expect(text.table?.columns).toEqual(['Every part of this attic'])
    expect(text.moreFields).toContain('Porch')
    for (const row of strictestRows(facts.fields)) {
      for (const field of facts.fields) expect(row.weightLb).toBeLessThanOrEqual(field.rows!.find(other => other.toFt >= row.toFt - 1e-9)?.weightLb ?? field.rows!.at(-1)!.weightLb)
    }
  })
})

describe('the hatch card that lets nothing up says so and why', () => {
  it.each<[string, ReturnType<typeof card>, string, string[]]>([
    ['trusses', card({ ...sound, framing: 'trusses' }), 'No storage', [TRUSS_CAUTION]],
    ['unknown framing', card({ ...sound, framing: 'unknown' }), 'No storage', []],
    ['no survey', card(null), 'No storage', []],
    ['an empty attic on hold', card({ ...sound, conditions: ['wet'] }), 'On hold: no storage', [HOLD_CAUTION]],
    ['a loaded attic on hold', card({ ...sound, conditions: ['cut'] }, { items: [boxes(100)] }), 'On hold: no storage', [HOLD_CAUTION, UNLOAD_FIRST]],
    ['an attic that is over', card(sound, { items: [boxes(900, 5)] }), 'Add nothing', [UNLOAD_FIRST]],
    ['a low attic', card({ ...sound, clearHeightIn: 30 }), 'No storage', []],
  ])('%s', (_, { facts, text }, word, cautions) => {
    expect(text).toMatchObject({ word, isBarred: true, table: null, noTable: null, fields: [] })
    expect(facts.fields.every(field => field.rows === null)).toBe(true)
    expect(text.cautions).toEqual(expect.arrayContaining([...cautions, ESTIMATE_CAVEAT]))
    expect(text.why.length > 0 || /trusses|Nobody/.test(text.says)).toBe(true)
    expect(text.never).toContain('Boxes of any kind, light ones too')
  })

  it('no figure for a box stands on a card for trusses, even with a paper that rates them', () => {
    const { facts, text } = card({ ...sound, framing: 'trusses' }, { documents: [drawing] })
    expect(facts).toMatchObject({ mayStore: true, ratedPsf: 10, fields: [] })
    expect(text).toMatchObject({ says: 'At most 10\u00A0psf, spread out.', table: null })
    expect(text.noTable).toContain('ask its writer')
    expect(text.cautions).toContain(TRUSS_CAUTION)
  })

  it('unmeasured joists have a rating but no figure for a box', () => {
    const { text } = card({ ...sound, joistFields: [emptyJoistField('Main')] })
    expect(text).toMatchObject({ word: 'Light things only', says: 'At most 10\u00A0psf, spread out.', table: null, fields: [] })
    expect(text.noTable).toContain('before the joists are measured')
  })

  it('nearly full asks for nothing more', () => {
    expect(card(sound, { items: [boxes(240, 5)] }).text).toMatchObject({ word: 'Nearly full', isBarred: false })
  })
})
