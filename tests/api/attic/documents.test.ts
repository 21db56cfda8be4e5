import { createHash } from 'node:crypto'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { addDays } from '../../../shared/utils/days'
import { plantCeilingHome, type CeilingHome } from '../../support/ceilingHome'
import { startServer, type TestServer } from '../../support/server'
import type { paperForm, Refusal } from './atticInputs'
import { about, joists, newAttic } from './atticInputs'
import { emptyPdf } from './paperBytes'

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

const text = (words: string) => new TextEncoder().encode(words)
const documentsOf = (atticId: string) => home.db.selectFrom('atticDocument').selectAll().where('atticId', '=', atticId).execute()

describe('a paper on file', () => {
  it('is kept with its hash, rates the attic, and is downloaded as it was sent', async () => {
    const attic = await newAttic(home)
    await attic.survey()
    const { status, body } = await attic.paper(about(home.today), { name: 'létter „1“.pdf' })
    expect(status).toBe(200)
    expect(body).not.toHaveProperty('storedKey')
    expect(await documentsOf(attic.id)).toMatchObject([{ kind: 'engineer-letter', ratedPsf: 15, mediaType: 'application/pdf', byteLength: emptyPdf.length, sha256: createHash('sha256').update(emptyPdf).digest('hex'), withdrawnAt: null }])
    const detail = await attic.read()
    expect(detail.contents.rating).toMatchObject({ ratedPsf: 15, basis: 'document' })
    expect(detail.documents).toMatchObject([{ fileName: 'létter „1“.pdf', writtenBy: 'Edda Invented, PE' }])
    expect((await attic.rows.actions()).at(-1)).toBe('document added')
    const download = await home.tenant.send(`/api/documents/${body.id}`)
    expect(download.headers.get('content-type')).toBe('application/pdf')
    expect(download.headers.get('content-disposition')).toBe('attachment; filename*=UTF-8\'\'l%C3%A9tter%20%E2%80%9E1%E2%80%9C.pdf')
    expect(download.headers.get('content-security-policy')).toContain('sandbox')
    expect(download.headers.get('cache-control')).toMatch(/private|no-store/)
    expect(Buffer.from(await download.arrayBuffer()).equals(Buffer.from(emptyPdf))).toBe(true)
  })

  it('may be a photo of it, whatever its name says', async () => {
    const attic = await newAttic(home)
    const bytes = await sharp({ create: { width: 40, height: 40, channels: 3, background: '#fff' } }).png().toBuffer()
    expect((await attic.paper(about(home.today), { bytes, name: '../../etc/letter.pdf' })).status).toBe(200)
    expect(await documentsOf(attic.id)).toMatchObject([{ mediaType: 'image/png', fileName: 'letter.pdf' }])
  })

  it('lets strongbacks count in the verdict when the engineer says so, and no longer once it is withdrawn', async () => {
    const attic = await newAttic(home)
    await attic.survey({ joistFields: [joists({ strongbacks: [{ atFt: 6, size: '2x6', breadthIn: null, depthIn: null, sound: true, engineerAccepts: false }] })] })
    await attic.put({ xFt: 5, yFt: 7, quantity: 4 })
    const counts = async () => {
      const [field] = (await attic.read()).contents.fields
      return field?.plan?.kind === 'judged' && field.plan.strongbacksCount
    }
    expect(await counts()).toBe(false)
    const { body } = await attic.paper(about(home.today, { acceptsStrongbacks: true }))
    expect(await documentsOf(attic.id)).toMatchObject([{ acceptsStrongbacks: true }])
    expect(await counts()).toBe(true)
    await home.owner.post(`/api/documents/${body.id}/withdrawal`)
    expect(await counts()).toBe(false)
  })

  it('that was withdrawn rates nothing any more, and stays on file', async () => {
    const attic = await newAttic(home)
    await attic.survey()
    const { body } = await attic.paper(about(home.today))
    expect((await home.owner.post(`/api/documents/${body.id}/withdrawal`)).status).toBe(200)
    expect((await attic.read()).contents.rating).toMatchObject({ ratedPsf: 20, basis: 'class' })
    expect((await documentsOf(attic.id))[0]!.withdrawnAt).toEqual(expect.any(String))
    expect((await attic.rows.actions()).at(-1)).toBe('document withdrawn')
    expect((await home.owner.get(`/api/documents/${body.id}`)).status).toBe(200)
    expect(await home.owner.post<Refusal>(`/api/documents/${body.id}/withdrawal`)).toMatchObject({ status: 409, body: { data: { code: 'withdrawn' } } })
  })
})

describe('what is no paper', () => {
  it.each<[string, number, Parameters<typeof paperForm>[1], string]>([
    ['a text file renamed .pdf', 415, { bytes: text('Dear owner, store what you like.') }, 'file'],
    ['a page of script renamed .pdf', 415, { bytes: text('<html><script>alert(1)</script></html>') }, 'file'],
    ['a drawing that can carry script', 415, { bytes: text('<svg xmlns="http://www.w3.org/2000/svg"/>'), name: 'a.png', type: 'image/png' }, 'file'],
    ['an empty file', 422, { bytes: new Uint8Array() }, 'file'],
    ['no file', 422, null, 'file'],
  ])('is refused: %s', async (_what, status, file, field) => {
    const attic = await newAttic(home)
    const answer = await attic.paper(about(home.today), file)
    expect(answer.status).toBe(status)
    expect(answer.body.data.fields).toHaveProperty(field)
    expect(await documentsOf(attic.id)).toEqual([])
  })

  it('is refused over 20 MB, by its stated length and by what arrives', async () => {
    const attic = await newAttic(home)
    const large = new Uint8Array(20_000_001)
    large.set(emptyPdf)
    expect(await attic.paper(about(home.today), { bytes: large })).toMatchObject({ status: 413, body: { data: { code: 'too-large', fields: { file: expect.any(String) } } } })
    expect((await attic.paper(about(home.today), { bytes: new Uint8Array(21_000_000) }).catch(() => ({ status: 413 }))).status).toBe(413)
    expect(await documentsOf(attic.id)).toEqual([])
  })

  it.each<[string, unknown, string | undefined]>([
    ['of a kind we do not know', { kind: 'rumour' }, 'kind'],
    ['nobody wrote', { writtenBy: '' }, 'writtenBy'],
    ['without a date', { writtenOn: null }, 'writtenOn'],
    ['of a day to come', { writtenOn: '2198-01-01' }, 'writtenOn'],
    ['for a part that is not named', { coversWholeAttic: false }, 'area'],
    ['that states a load below zero', { ratedPsf: -1 }, 'ratedPsf'],
    ['a permit that would let strongbacks share', { kind: 'permit', acceptsStrongbacks: true }, 'acceptsStrongbacks'],
    ['a permit that would lift a hold', { kind: 'permit', liftsHold: true }, 'liftsHold'],
  ])('is refused at its field: a paper %s', async (_what, change, field) => {
    const attic = await newAttic(home)
    const { status, body } = await attic.paper(about(home.today, change as object))
    expect(status).toBe(422)
    expect(Object.keys(body.data.fields!)).toEqual([field])
  })

  it('is refused when the words that go with it are missing or broken, or it is no form', async () => {
    const attic = await newAttic(home)
    expect((await attic.paper(undefined)).body.data.code).toBe('not-readable')
    expect((await attic.paper('{')).body.data.code).toBe('not-readable')
    expect((await home.owner.post<Refusal>(`${attic.path}/documents`, { file: 'x' })).body.data.code).toBe('not-readable')
    expect((await home.owner.post<Refusal>(`${attic.path}/documents`, 'no parts', { headers: { 'content-type': 'multipart/form-data; boundary=x' } })).status).toBe(422)
  })
})

describe('a hold', () => {
  const inspected = (writtenOn: string, change: object = {}) => about(writtenOn, { kind: 'inspection-record', ratedPsf: null, liftsHold: true, ...change })

  async function held() {
    const attic = await newAttic(home)
    await attic.survey({ surveyedOn: addDays(home.today, -10), conditions: ['notched'] })
    return attic
  }

  it('outlives a new survey that sees no damage, and ends with the paper', async () => {
    const attic = await held()
    await attic.survey({ surveyedOn: addDays(home.today, -5) })
    await attic.survey()
    expect((await attic.read()).contents.rating).toMatchObject({ hold: true, ratedPsf: 0, reasons: [{ code: 'earlier-hold', foundOn: addDays(home.today, -10) }] })
    expect(await attic.rows.status()).toMatchObject({ loadState: 'hold' })
    const { body } = await attic.paper(inspected(home.today))
    await attic.survey()
    expect((await attic.read()).contents.rating).toMatchObject({ hold: false, ratedPsf: 20 })
    await home.owner.post(`/api/documents/${body.id}/withdrawal`)
    expect((await attic.read()).contents.rating).toMatchObject({ hold: true })
  })

  it('is lifted by an inspection record of the survey\'s day or later, and comes back when that is withdrawn', async () => {
    const attic = await held()
    const { body } = await attic.paper(inspected(addDays(home.today, -10)))
    expect((await attic.read()).contents.rating).toMatchObject({ hold: false, ratedPsf: 20 })
    expect(await attic.rows.status()).toMatchObject({ loadState: 'within' })
    await home.owner.post(`/api/documents/${body.id}/withdrawal`)
    expect((await attic.read()).contents.rating).toMatchObject({ hold: true, ratedPsf: 0 })
  })

  it.each<[string, (today: string) => object]>([
    ['is older than the survey', today => inspected(addDays(today, -11))],
    ['does not say so', today => inspected(today, { liftsHold: false })],
    ['covers a part', today => inspected(today, { coversWholeAttic: false, area: 'north side' })],
  ])('stands when the record %s', async (_what, words) => {
    const attic = await held()
    expect((await attic.paper(words(home.today))).status).toBe(200)
    expect((await attic.read()).contents.rating).toMatchObject({ hold: true })
  })
})

describe('a trussed attic', () => {
  it('takes a figure from its drawings or an engineer, never a capacity of our own', async () => {
    const attic = await newAttic(home)
    await attic.survey({ framing: 'trusses', joistFields: [] })
    await attic.paper(about(home.today, { kind: 'truss-drawing', ratedPsf: 10 }))
    await attic.put({ quantity: 1 })
    const { contents } = await attic.read()
    expect(contents).toMatchObject({ state: 'near', utilisation: null, ratedTotalLb: null, fields: [], rating: { ratedPsf: 10, basis: 'document' } })
    expect(contents.rating!.joistCheck).toBeUndefined()
  })

  it('gets none from a permit', async () => {
    const attic = await newAttic(home)
    await attic.survey({ framing: 'trusses', joistFields: [] })
    await attic.paper(about(home.today, { kind: 'permit', ratedPsf: 20 }))
    expect((await attic.read()).contents.rating).toMatchObject({ ratedPsf: 0, basis: 'framing' })
  })
})
