import { existsSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import { request } from 'node:http'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { PhotoRef } from '../../../shared/types/photo'
import { drawnPhoto, photoForm, plantCeilingHome, type CeilingHome } from '../../support/ceilingHome'
import { pngBomb } from '../../support/pngBomb'
import { startServer, type TestServer } from '../../support/server'

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

interface Refusal { message: string, data: { code: string, fields?: Record<string, string> } }

const path = () => `/api/units/${home.unitId}/photos`
const upload = (bytes: Uint8Array, options?: Parameters<typeof photoForm>[1]) => home.tenant.post<PhotoRef & Refusal>(path(), photoForm(bytes, options))

describe('sending a photo', () => {
  it('stores three sizes as files, with a row that nothing owns yet', async () => {
    const sent = await upload(await drawnPhoto(1), { view: 'wide' })
    expect(sent).toMatchObject({ status: 200, body: { view: 'wide', widthPx: 640, heightPx: 480, cameraTime: null } })
    const row = await home.db.selectFrom('photo').selectAll().where('id', '=', sent.body.id).executeTakeFirstOrThrow()
    expect(row).toMatchObject({ unitId: home.unitId, organisationId: home.organisationId, uploadedBy: home.tenantId, observationId: null, markId: null })
    expect(readdirSync(join(server.dataDir, 'photos', row.storedKey)).sort()).toEqual(['full.jpg', 'screen.webp', 'thumb.webp'])
  })

  it('answers the same photo again when a bad line made it be sent twice', async () => {
    const bytes = await drawnPhoto(2)
    expect((await upload(bytes)).body.id).toBe((await upload(bytes)).body.id)
  })

  it('turns the picture upright, keeps the camera time and removes the location from every stored size', async () => {
    const bytes = await sharp(await drawnPhoto(3)).withExif({
      IFD2: { DateTimeOriginal: '2027:03:14 14:08:09' }, IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '51/1 30/1 0/1' },
    }).withMetadata({ orientation: 6 }).jpeg().toBuffer()
    expect((await sharp(bytes).metadata()).exif).toBeDefined()
    const { body } = await upload(bytes)
    expect(body).toMatchObject({ widthPx: 480, heightPx: 640, cameraTime: '2027-03-14 14:08:09' })
    for (const size of ['thumb', 'screen', 'full']) {
      const stored = await sharp(Buffer.from(await (await home.tenant.send(`/photos/${body.id}/${size}`)).arrayBuffer())).metadata()
      expect([stored.exif, stored.orientation, stored.height! > stored.width!]).toEqual([undefined, undefined, true])
    }
  })

  it.each<[string, number, string, () => Promise<Uint8Array>]>([
    ['an SVG with a script', 415, 'not-a-photo', async () => Buffer.from('<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>')],
    ['an HTML page named .jpg', 415, 'not-a-photo', async () => Buffer.from('<!doctype html><script>alert(1)</script>')],
    ['a HEIC file', 415, 'heic-photo', async () => Buffer.concat([Buffer.from([0, 0, 0, 24]), Buffer.from('ftypheic0000mif1heic', 'latin1'), Buffer.alloc(200)])],
    ['a JPEG cut short', 422, 'broken-photo', async () => (await drawnPhoto(4, 2000, 1500)).subarray(0, 9000)],
    ['a JPEG beginning and nothing else', 422, 'broken-photo', async () => Buffer.from('ffd8ffe000104a46494600010100000100010000ffd9', 'hex')],
    ['an empty file', 422, 'empty-file', async () => Buffer.alloc(0)],
    ['a PNG bomb of 40,000 × 40,000 dots', 422, 'too-many-dots', async () => pngBomb(40_000, 40_000)],
  ])('refuses %s by its content', async (_what, status, code, make) => {
    const refused = await upload(await make())
    expect([refused.status, refused.body.data.code]).toEqual([status, code])
    expect(refused.body.message).toMatch(/\.$/)
  })

  it('stores nothing of what hides behind a picture', async () => {
    const polyglot = Buffer.concat([await drawnPhoto(5), Buffer.from('\n<script>alert(1)</script>')])
    const { status, body } = await upload(polyglot, { name: '../../evil.html', type: 'text/html' })
    expect(status).toBe(200)
    const answer = await home.tenant.send(`/photos/${body.id}/full`)
    expect(answer.headers.get('content-type')).toBe('image/jpeg')
    expect(Buffer.from(await answer.arrayBuffer()).includes('<script>')).toBe(false)
  })

  it('refuses forms it cannot use, at the field', async () => {
    expect(await home.tenant.post(path(), { photo: 'x' })).toMatchObject({ status: 415, body: { data: { code: 'not-a-form' } } })
    expect(await home.tenant.post(path(), 'no form at all', { headers: { 'content-type': 'multipart/form-data; boundary=x' } })).toMatchObject({ status: 422, body: { data: { code: 'broken-form' } } })
    expect(await home.tenant.post(path(), '', { headers: { 'content-type': 'multipart/form-data' } })).toMatchObject({ status: 422 })
    expect(await home.tenant.post(path(), new FormData())).toMatchObject({ status: 422 })
    const text = new FormData()
    text.set('photo', 'just words')
    expect(await home.tenant.post(path(), text)).toMatchObject({ status: 422, body: { data: { fields: { photo: 'Choose a photo first.' } } } })
    const two = photoForm(await drawnPhoto(6))
    two.append('photo', new File(['x'], 'b.jpg'))
    expect(await home.tenant.post(path(), two)).toMatchObject({ status: 422, body: { data: { fields: { photo: 'Send one photo at a time.' } } } })
    expect(await upload(await drawnPhoto(6), { view: 'selfie' })).toMatchObject({ status: 422, body: { data: { fields: { view: expect.any(String) } } } })
  })

  it('refuses more than 20 MB, before or after reading it', async () => {
    expect((await upload(Buffer.alloc(20_000_010, 1))).status).toBe(413)
    expect(await statusOfStated(25_000_000)).toBe(413)
  })

  it('stops somebody who keeps sending without reporting', async () => {
    await home.db.insertInto('photo').values(Array.from({ length: 24 }, (_, i) => ({
      id: `00000000-0000-7000-8000-0000000000${i + 10}`, organisationId: home.organisationId, unitId: home.unitId, sha256: String(i).padStart(64, '0'), widthPx: 1, heightPx: 1, byteLength: 1,
      storedKey: 'none', uploadedBy: home.tenantId, uploadedAt: new Date().toISOString(),
    }))).execute()
    expect(await upload(await drawnPhoto(7))).toMatchObject({ status: 429, body: { data: { code: 'too-many-tries' } } })
    await home.db.deleteFrom('photo').where('storedKey', '=', 'none').execute()
  })
})

/** Node's client, because fetch will not state a length it does not send. */
function statusOfStated(bytes: number): Promise<number | undefined> {
  const { hostname, port } = new URL(server.url)
  const cookie = home.tenant.cookies().map(({ name, value }) => `${name}=${value}`).join('; ')
  return new Promise((resolve, reject) => {
    const sending = request({ hostname, port, path: path(), method: 'POST', headers: { cookie, 'origin': server.url, 'content-type': 'multipart/form-data; boundary=x', 'content-length': bytes } }, (answer) => {
      resolve(answer.statusCode)
      sending.destroy()
    })
    sending.on('error', reject)
    sending.write('--x\r\n')
  })
}

describe('who may send and see', () => {
  it('takes photos from those who live there or run it, and from nobody else', async () => {
    const send = async (client: CeilingHome['owner']) => (await client.post(path(), photoForm(await drawnPhoto(20)))).status
    expect(await send(home.nobody)).toBe(401)
    expect(await send(home.stranger)).toBe(404)
    expect(await send(home.neighbour)).toBe(404)
    expect(await send(home.engineer)).toBe(403)
    expect(await send(home.owner)).toBe(200)
    expect((await home.tenant.post('/api/units/not-an-id/photos', photoForm(await drawnPhoto(21)))).status).toBe(404)
  })

  it('shows a picture only to those who may see the home', async () => {
    const { body: { id } } = await upload(await drawnPhoto(22))
    const see = async (client: CeilingHome['owner']) => (await client.send(`/photos/${id}/thumb`)).status
    expect(await see(home.nobody)).toBe(401)
    expect([await see(home.stranger), await see(home.neighbour), await see(home.trades)]).toEqual([404, 404, 404])
    expect([await see(home.tenant), await see(home.owner), await see(home.engineer)]).toEqual([200, 200, 200])
    for (const address of [`/photos/${id}/huge`, `/photos/${id}/..%2f`, '/photos/00000000-0000-7000-8000-000000000000/thumb']) expect((await home.tenant.send(address)).status).toBe(404)
  })

  it('lets the browser keep a picture for this person only, and asks again each time', async () => {
    const { body: { id } } = await upload(await drawnPhoto(23))
    const first = await home.tenant.send(`/photos/${id}/screen`)
    expect(Object.fromEntries(['content-type', 'cache-control', 'x-content-type-options', 'content-security-policy'].map(name => [name, first.headers.get(name)]))).toEqual({
      'content-type': 'image/webp', 'cache-control': 'private, no-cache', 'x-content-type-options': 'nosniff', 'content-security-policy': 'default-src \'none\'; sandbox',
    })
    const etag = first.headers.get('etag')!
    expect((await home.tenant.send(`/photos/${id}/screen`, { headers: { 'if-none-match': etag } })).status).toBe(304)
    expect((await home.neighbour.send(`/photos/${id}/screen`, { headers: { 'if-none-match': etag } })).status).toBe(404)
  })

  it('says so when a picture is gone from the store', async () => {
    const { body: { id } } = await upload(await drawnPhoto(24))
    await home.db.updateTable('photo').set({ storedKey: 'gone/away' }).where('id', '=', id).execute()
    expect(existsSync(join(server.dataDir, 'photos/gone'))).toBe(false)
    expect((await home.tenant.send(`/photos/${id}/thumb`)).status).toBe(404)
  })
})
