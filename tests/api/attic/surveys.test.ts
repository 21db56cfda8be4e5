import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { verifyChain } from '../../../server/db/commands/appendRecord'
import { addDays } from '../../../shared/utils/days'
import { plantCeilingHome, type CeilingHome } from '../../support/ceilingHome'
import { startServer, type TestServer } from '../../support/server'
import { joists, newAttic, type Refusal } from './atticInputs'

let server: TestServer
let home: CeilingHome
beforeAll(async () => {
  server = await startServer()
  home = await plantCeilingHome(server)
})
afterAll(async () => {
  await home?.close()
  await server?.stop()
})

describe('surveying an attic', () => {
  it('keeps the answers with the rating they gave, and writes it to the record', async () => {
    const attic = await newAttic(home)
    const { status, body } = await attic.survey()
    expect(status).toBe(200)
    // IRC Table R301.5: 42 in clear height and a 20 × 30 in opening make limited storage, 20 psf.
    expect(body.rating).toMatchObject({ ratedPsf: 20, hold: false, basis: 'class' })
    const row = await home.db.selectFrom('atticSurvey').selectAll().where('id', '=', body.surveyId).executeTakeFirstOrThrow()
    expect(row).toMatchObject({ atticId: attic.id, unitId: home.unitId, surveyedOn: home.today, ratedPsf: 20, onHold: false, basis: 'class', answers: { framing: 'rafters-and-joists', joistFields: [{ size: '2x10' }] } })
    expect(await attic.rows.status()).toMatchObject({ loadState: 'within', ratedPsf: 20, storedLb: 0 })
    expect(await attic.rows.actions()).toEqual(['attic added', 'attic surveyed'])
    expect(await verifyChain(home.db, home.unitId)).toMatchObject({ kind: 'unbroken' })
  })

  it('shows the attic with its survey, judged, with day, home and abilities', async () => {
    const attic = await newAttic(home, 'Loft of its own')
    await attic.survey()
    await attic.put()
    expect(await attic.read()).toMatchObject({
      today: home.today, attic: { name: 'Loft of its own', archivedAt: null }, unit: { id: home.unitId, name: 'Flat 1' }, property: { name: 'Invented Row', yearBuilt: 1961 },
      survey: { surveyedOn: home.today }, surveys: [{ ratedPsf: 20, surveyedByName: expect.any(String) }], items: [{ name: 'Invented boxes', version: 1 }],
      contents: { state: 'within', totalLb: 60, ratedTotalLb: 3840, outside: [], rating: { ratedPsf: 20 } },
    })
  })

  it('keeps earlier surveys; the newest one holds', async () => {
    const attic = await newAttic(home)
    await attic.survey({ surveyedOn: addDays(home.today, -30), clearHeightIn: 30 })
    expect((await attic.read()).contents.state).toBe('no-storage')
    await attic.survey()
    const detail = await attic.read()
    expect(detail.contents.state).toBe('empty')
    expect(detail.surveys.map(row => row.ratedPsf)).toEqual([20, 0])
  })

  it('takes "not sure" for every answer, and says unverified', async () => {
    const attic = await newAttic(home)
    const unknown = joists({ species: 'unknown', grade: 'unknown', size: null, spacingIn: null, spanFt: null, joistCount: null, topEdgeBraced: null })
    const { status, body } = await attic.survey({ joistFields: [unknown], conditions: null, deck: 'unknown', ceilingFinish: 'unknown' })
    expect(status).toBe(200)
    expect(body.rating).toMatchObject({ ratedPsf: 10, basis: 'unverified' })
  })

  it('takes at most 10 psf where nobody is sure that the walls bear, and 0.9 of the bending where things stand for long', async () => {
    const attic = await newAttic(home)
    expect((await attic.survey({ joistFields: [joists({ bothEndsBear: null })] })).body.rating).toMatchObject({ ratedPsf: 10, basis: 'unverified' })
    expect((await attic.survey({ standsOverTenYears: true, joistFields: [joists({ bothEndsBear: true })] })).body.rating).toMatchObject({ ratedPsf: 20, joistCheck: [{ factors: { cd: 0.9 } }] })
    expect(await attic.rows.status()).toMatchObject({ ratedPsf: 20 })
  })

  it.each(['wet', 'mouldy', 'rotten', 'insect-damaged', 'cut', 'cracked-through', 'sagging', 'notched', 'bored'] as const)('sets the attic on hold for %s wood', async (condition) => {
    const attic = await newAttic(home)
    expect((await attic.survey({ conditions: [condition] })).body.rating).toMatchObject({ ratedPsf: 0, hold: true, basis: 'hold' })
    expect(await attic.rows.status()).toMatchObject({ loadState: 'hold' })
  })

  it('finds contents under a hold at once, and clears the finding when they are out', async () => {
    const attic = await newAttic(home)
    const { body: item } = await attic.put()
    expect(await attic.rows.findings()).toEqual(['contents-without-survey'])
    await attic.survey({ conditions: ['rotten'] })
    expect(await attic.rows.findings()).toEqual(['contents-under-hold'])
    await home.owner.post(`/api/items/${item.id}/removal`, { removedOn: home.today, version: 1 })
    expect(await attic.rows.findings()).toEqual([])
  })
})

describe('trusses', () => {
  it('take no joists: refused at the field, never calculated', async () => {
    const attic = await newAttic(home)
    const { status, body } = await attic.survey({ framing: 'trusses' })
    expect(status).toBe(422)
    expect(body.data.fields!.joistFields).toMatch(/Trusses are never calculated/)
  })

  it('are rated 0 without a paper, with no joist check, no plan, and no place to suggest', async () => {
    const attic = await newAttic(home)
    expect((await attic.survey({ framing: 'trusses', joistFields: [] })).body.rating).toMatchObject({ ratedPsf: 0, basis: 'framing' })
    await attic.put({ typicalLb: 30, xFt: 90 })
    const { contents } = await attic.read()
    expect(contents).toMatchObject({ state: 'no-storage', utilisation: null, ratedTotalLb: null, worstJoist: null, fields: [] })
    expect(contents.rating!.joistCheck).toBeUndefined()
    expect(await attic.rows.findings()).toEqual(['contents-without-storage'])
  })
})

describe('an unsound survey', () => {
  it.each<[string, object, string]>([
    ['no day of the calendar', { surveyedOn: '2026-02-30' }, 'surveyedOn'],
    ['a framing we do not know', { framing: 'domes' }, 'framing'],
    ['a height below zero', { clearHeightIn: -4 }, 'clearHeightIn'],
    ['a span of 400 ft', { joistFields: [joists({ spanFt: 400 })] }, 'joistFields.0.spanFt'],
    ['joists 2 in apart', { joistFields: [joists({ spacingIn: 2 })] }, 'joistFields.0.spacingIn'],
    ['a span of 40.5 ft', { joistFields: [joists({ spanFt: 40.5 })] }, 'joistFields.0.spanFt'],
    ['no joists at all', { joistFields: [joists({ joistCount: 0 })] }, 'joistFields.0.joistCount'],
    ['a size we do not know', { joistFields: [joists({ size: '2x7' as '2x6' })] }, 'joistFields.0.size'],
    ['two groups in one place', { joistFields: [joists({ layout: { leftFt: 0, frontFt: 0, joistsRun: 'left-right' } }), joists({ name: 'South side', layout: { leftFt: 4, frontFt: 2, joistsRun: 'front-back' } })] }, 'joistFields.1.layout'],
    ['half a joist', { joistFields: [joists({ joistCount: 2.5 })] }, 'joistFields.0.joistCount'],
    ['a group without a name', { joistFields: [joists({ name: ' ' })] }, 'joistFields.0.name'],
    ['a notch above nothing', { joistFields: [joists({ notches: [{ depthIn: 0, lengthIn: 1, place: 'end', edge: 'top' }] })] }, 'joistFields.0.notches.0.depthIn'],
    ['a strongback outside the walls', { joistFields: [joists({ strongbacks: [{ atFt: 12, size: '2x6', breadthIn: null, depthIn: null, sound: true, engineerAccepts: false }] })] }, 'joistFields.0.strongbacks.0.atFt'],
    ['a strongback accepted by no engineer', { joistFields: [joists({ strongbacks: [{ atFt: 6, size: '2x6', breadthIn: null, depthIn: null, sound: true, engineerAccepts: true as false }] })] }, 'joistFields.0.strongbacks.0.engineerAccepts'],
    ['pine proven old that was put in later', { joistFields: [joists({ installedBeforeJune2013: false, preJune2013StampProven: true })] }, 'joistFields.0.preJune2013StampProven'],
    ['an area of boards that lie all over', { deck: 'full', deckAreaFt2: 80 }, 'deckAreaFt2'],
    ['a bearing wall that is a word', { joistFields: [joists({ bothEndsBear: 'perhaps' as unknown as boolean })] }, 'joistFields.0.bothEndsBear'],
    ['a condition we do not know', { conditions: ['haunted'] }, 'conditions.0'],
    ['a field nobody asked for', { ratedPsf: 500 }, 'form'],
  ])('is refused at its field: %s', async (_what, change, field) => {
    const attic = await newAttic(home)
    const { status, body } = await attic.survey(change)
    expect(status).toBe(422)
    expect(Object.keys(body.data.fields!)).toContain(field)
    expect(await home.db.selectFrom('atticSurvey').select('id').where('atticId', '=', attic.id).execute()).toEqual([])
  })

  it('is one of tomorrow, or one older than the survey that holds', async () => {
    const attic = await newAttic(home)
    expect((await attic.survey({ surveyedOn: addDays(home.today, 2) })).body.data.fields!.surveyedOn).toMatch(/not come yet/)
    await attic.survey()
    expect((await attic.survey({ surveyedOn: addDays(home.today, -1) })).body.data.fields!.surveyedOn).toMatch(/older survey cannot/)
  })

  it('is what is no JSON at all', async () => {
    const attic = await newAttic(home)
    expect(await home.owner.post<Refusal>(`${attic.path}/surveys`, '{', { headers: { 'content-type': 'application/json' } })).toMatchObject({ status: 422, body: { data: { code: 'not-json' } } })
    expect((await home.owner.post(`${attic.path}/surveys`, 'x', { headers: { 'content-type': 'text/plain' } })).status).toBe(415)
  })
})
