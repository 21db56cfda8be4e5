import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { AtticListRow } from '../../../shared/types/atticDetail'
import { plantCeilingHome, type CeilingHome } from '../../support/ceilingHome'
import { startServer, type TestServer } from '../../support/server'
import { item, newAttic, survey, type Refusal } from './atticInputs'

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

interface Listed { rows: AtticListRow[], next: string | null }
const list = (query: Record<string, string> = {}) => home.owner.get<Listed & Refusal>(`/api/attics?${new URLSearchParams(query)}`)

describe('the list of attics', () => {
  it('tells of each its home, rating, state, weight and days', async () => {
    const attic = await newAttic(home, 'Aaa first')
    await attic.survey()
    await attic.put()
    const [row] = (await list({ search: 'Aaa first' })).body.rows
    expect(row).toEqual({
      id: attic.id, name: 'Aaa first', unitId: home.unitId, unitName: 'Flat 1', propertyName: 'Invented Row', inventoryConfirmedOn: null,
      surveyedOn: home.today, ratedPsf: 20, loadState: 'within', utilisation: expect.any(Number), storedLb: 60, itemCount: 1,
    })
  })

  it('finds by attic, unit and property, taking signs of patterns as themselves', async () => {
    await newAttic(home, '100 % storage_room')
    const count = async (search: string) => (await list({ search })).body.rows.length
    expect([await count('100 %'), await count('storage_'), await count('STORAGE_'), await count('%%'), await count('e__t')]).toEqual([1, 1, 1, 0, 0])
    expect(await count('flat 1')).toBeGreaterThan(1)
    expect(await count('invented row')).toBeGreaterThan(1)
    expect(await count('nothing like it')).toBe(0)
  })

  it('pages through every name once, also those with accents, quotes and the same name twice', async () => {
    const names = ['Zoë’s loft', 'Łąka', 'Ärger', 'Dach "oben"', 'Dach "oben"', '屋根裏', 'été', '\\back', '🏠 roof']
    for (const name of names) await newAttic(home, `Paged ${name}`)
    const seen: string[] = []
    let after: string | undefined
    do {
      const { body } = await list({ search: 'Paged', limit: '2', ...after && { after } })
      expect(body.rows.length).toBeLessThanOrEqual(2)
      seen.push(...body.rows.map(row => row.name))
      after = body.next ?? undefined
    } while (after)
    expect(seen.slice().sort()).toEqual(names.map(name => `Paged ${name}`).sort())
  })

  it.each(['spoilt', 'W10', '%00', Buffer.from('["x","no id"]').toString('base64url'), Buffer.from('{"name":"x"}').toString('base64url'), Buffer.from('["\\u0000","018f0000-0000-7000-8000-000000000000"]').toString('base64url')])('refuses the spoilt cursor %s', async (after) => {
    expect(await list({ after })).toMatchObject({ status: 422, body: { data: { fields: { after: expect.any(String) } } } })
  })

  it.each([['limit', '0'], ['limit', '9999'], ['limit', 'x'], ['search', 'x'.repeat(101)], ['colour', 'red']])('refuses %s=%s', async (name, value) => {
    expect((await list({ [name]: value })).status).toBe(422)
  })

  it('shows nothing of another organisation', async () => {
    expect((await home.stranger.get<Listed>('/api/attics')).body).toEqual({ rows: [], next: null })
  })
})

describe('an attic itself', () => {
  const edit = (path: string, body: object) => home.owner.patch<Refusal & { name: string, version: number }>(path, body)

  it('is renamed and annotated, with the record', async () => {
    const attic = await newAttic(home)
    expect((await edit(attic.path, { name: ' Roof space ', notes: 'Hatch in the hall', version: 1 })).body).toMatchObject({ name: 'Roof space', version: 2 })
    expect((await attic.read()).attic).toMatchObject({ name: 'Roof space', notes: 'Hatch in the hall' })
    expect((await attic.rows.actions()).at(-1)).toBe('attic changed')
  })

  it('keeps the first of two edits, and shows it to the second', async () => {
    const attic = await newAttic(home)
    await edit(attic.path, { name: 'Theirs', notes: '', version: 1 })
    expect(await edit(attic.path, { name: 'Mine', notes: '', version: 1 })).toMatchObject({ status: 409, body: { data: { code: 'changed-meanwhile', theirs: { name: 'Theirs', version: 2 } } } })
  })

  it.each<[string, object, string]>([
    ['no name', { name: '', notes: '', version: 1 }, 'name'], ['a name without end', { name: 'x'.repeat(121), notes: '', version: 1 }, 'name'],
    ['notes without end', { name: 'x', notes: 'x'.repeat(5001), version: 1 }, 'notes'], ['no version', { name: 'x', notes: '' }, 'version'],
  ])('refuses %s', async (_what, body, field) => {
    const attic = await newAttic(home)
    expect((await edit(attic.path, body)).body.data.fields).toHaveProperty(field)
  })

  it('is archived when it is empty, leaves list and findings, and comes back', async () => {
    const attic = await newAttic(home, 'Archived one')
    await attic.survey()
    expect((await home.owner.post(`${attic.path}/archive`, { version: 1 })).status).toBe(200)
    expect((await attic.read()).attic.archivedAt).toEqual(expect.any(String))
    expect((await list({ search: 'Archived one' })).body.rows).toEqual([])
    expect(await attic.rows.status()).toBeUndefined()
    const refused = [await attic.survey(), await attic.put(), await home.owner.post<Refusal>(`${attic.path}/inventory-confirmation`, { confirmedOn: home.today })]
    expect(refused.map(({ status, body }) => [status, body.data.code])).toEqual([[409, 'archived'], [409, 'archived'], [409, 'archived']])
    expect((await home.owner.post(`${attic.path}/restore`, { version: 2 })).status).toBe(200)
    expect((await list({ search: 'Archived one' })).body.rows).toHaveLength(1)
    expect(await attic.rows.status()).toMatchObject({ loadState: 'within' })
    expect((await attic.rows.actions()).slice(-2)).toEqual(['attic archived', 'attic restored'])
  })

  it('is not archived while something is stored in it, nor with a stale version', async () => {
    const attic = await newAttic(home)
    const { body: { id } } = await home.owner.post<{ id: string }>(`${attic.path}/items`, item(home.today))
    expect(await home.owner.post<Refusal>(`${attic.path}/archive`, { version: 1 })).toMatchObject({ status: 409, body: { data: { code: 'still-loaded', storedLb: 60 } } })
    await home.owner.post(`/api/items/${id}/removal`, { removedOn: home.today, version: 1 })
    expect(await home.owner.post<Refusal>(`${attic.path}/archive`, { version: 3 })).toMatchObject({ status: 409, body: { data: { code: 'changed-meanwhile' } } })
    expect((await home.owner.post(`${attic.path}/archive`, {})).status).toBe(422)
  })

  it('shows the same to the tenant and the engineer of the home', async () => {
    const attic = await newAttic(home)
    await home.owner.post(`${attic.path}/surveys`, survey(home.today))
    const [staff, tenant, engineer] = await Promise.all([home.owner, home.tenant, home.engineer].map(async as => (await as.get<{ abilities: unknown, contents: object }>(attic.path)).body))
    expect({ ...tenant, abilities: null }).toEqual({ ...staff, abilities: null })
    expect({ ...engineer, abilities: null }).toEqual({ ...staff, abilities: null })
  })
})
