import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { KeptSurvey } from '../../../shared/types/atticDetail'
import type { CodeBasis } from '../../../shared/types/attic'
import { addDays } from '../../../shared/utils/days'
import { compareSurveys } from '../../../shared/utils/messages/surveyChanges'
import { IRC_R301_5 } from '../../../shared/utils/structure/codeClass'
import { openServer, type OpenHome, type OpenServer } from '../review/openHome'
import { entryAbout, expectGuarded, expectUnsound } from '../homes/guarded'
import { joists, survey } from './atticInputs'

let open: OpenServer
let home: OpenHome
beforeAll(async () => {
  open = await openServer()
  home = await open.openHome()
})
afterAll(() => open.close())

const newAttic = async () => `/api/attics/${(await home.as.owner.post<{ id: string }>(`/api/units/${home.unitId}/attics`, { name: 'Loft' })).body.id}`
const read = async (path: string) => (await home.as.owner.get<{ contents: { rating: { ratedPsf: number, classPsf: number, cautions: object[] } } }>(path)).body.contents.rating

describe('GET /api/attics/:id/surveys', () => {
  it('gives every survey as it was answered and rated on its day, newest first', async () => {
    const attic = await newAttic()
    const today = (await home.as.owner.get<{ today: string }>(attic)).body.today
    const first = survey(addDays(today, -40), { conditions: null })
    const second = survey(today, { joistFields: [joists({ spanFt: 13, bothEndsBear: true })], standsOverTenYears: true })
    for (const one of [first, second]) expect((await home.as.owner.post(`${attic}/surveys`, one)).status).toBe(200)
    const { status, body: { rows } } = await home.as.owner.get<{ rows: KeptSurvey[] }>(`${attic}/surveys`)
    expect([status, rows.map(row => row.surveyedOn)]).toEqual([200, [today, addDays(today, -40)]])
    expect(rows[0]).toMatchObject({ ratedPsf: 20, onHold: false, basis: 'class', answers: { standsOverTenYears: true, joistFields: [{ spanFt: 13, bothEndsBear: true }] } })
    expect(compareSurveys(rows[1]!.answers, rows[0]!.answers).map(({ label }) => label)).toEqual(['Things stay over ten years', 'State of the wood', 'Clear span', 'Both ends on bearing walls'])
    await expectGuarded(home, { method: 'get', path: `${attic}/surveys` })
  })

  it('refuses joists that cannot be, in the route as in the form', async () => {
    const attic = await newAttic()
    const today = (await home.as.owner.get<{ today: string }>(attic)).body.today
    const wrong = (change: Parameters<typeof joists>[0], path: string) => expectUnsound(home.as.owner, { method: 'post', path: `${attic}/surveys`, body: survey(today, { joistFields: [joists(change)] }) }, `joistFields.0.${path}`)
    await wrong({ size: null, breadthIn: 9, depthIn: 2 }, 'breadthIn')
    await wrong({ holes: [{ diameterIn: 9, edgeDistanceIn: 1, nearestOtherIn: null }] }, 'holes.0.diameterIn')
    await wrong({ preJune2013StampProven: true }, 'preJune2013StampProven')
  })
})

describe('PUT /api/properties/:id/code-basis', () => {
  const path = () => `/api/properties/${home.propertyId}/code-basis`
  const town: CodeBasis = { name: 'Invented town ordinance', note: 'Told at the counter.', psf: { 'habitable-or-fixed-stairs': 40, 'limited-storage': 15, 'no-storage': 10 } }
  const version = async () => (await home.as.owner.get<{ property: { version: number } }>(`/api/properties/${home.propertyId}`)).body.property.version

  it('judges every attic of the property by the new table, says its name, and goes back to the code\'s own', async () => {
    const attic = await newAttic()
    const { today } = (await home.as.owner.get<{ today: string }>(attic)).body
    await home.as.owner.post(`${attic}/surveys`, survey(today))
    expect(await read(attic)).toMatchObject({ ratedPsf: 20 })
    expect((await home.as.owner.put<{ codeBasis: CodeBasis }>(path(), { version: await version(), codeBasis: town })).body.codeBasis).toEqual(town)
    expect(await read(attic)).toMatchObject({ ratedPsf: 15, classPsf: 15, cautions: expect.arrayContaining([{ code: 'local-amendments', basisName: town.name }]) })
    const status = () => open.db.selectFrom('atticStatus').select('ratedPsf').where('atticId', '=', attic.split('/').at(-1)!).executeTakeFirstOrThrow()
    expect(await status()).toEqual({ ratedPsf: 15 })
    // A survey that was read and sent again carries the table; the server alone decides it.
    const again = { ...survey(today), codeBasis: { ...town, psf: { ...town.psf, 'limited-storage': 90 } } }
    expect((await home.as.owner.post<{ rating: object }>(`${attic}/surveys`, again)).body.rating).toMatchObject({ ratedPsf: 15 })
    expect(await entryAbout(open.db, home.propertyId)).toMatchObject({ action: 'code basis changed', after: { codeBasis: town } })
    await home.as.owner.put(path(), { version: await version(), codeBasis: null })
    expect([await status(), (await read(attic)).ratedPsf]).toEqual([{ ratedPsf: IRC_R301_5.psf['limited-storage'] }, 20])
  })

  it('is guarded, and refuses a stale version and tables that cannot be', async () => {
    await expectGuarded(home, { method: 'put', path: path(), body: { version: 1, codeBasis: null } }, 'not theirs')
    expect((await home.as.owner.put(path(), { version: 999, codeBasis: town })).status).toBe(409)
    const bad = (change: object, field: string) => version().then(now => expectUnsound(home.as.owner, { method: 'put', path: path(), body: { version: now, codeBasis: { ...town, ...change } } }, field))
    await bad({ name: ' ' }, 'codeBasis.name')
    await bad({ psf: { ...town.psf, 'limited-storage': 5 } }, 'codeBasis.psf.limited-storage')
    await bad({ psf: { ...town.psf, 'habitable-or-fixed-stairs': 2000 } }, 'codeBasis.psf.habitable-or-fixed-stairs')
  })
})
