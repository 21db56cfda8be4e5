import { existsSync } from 'node:fs'
import { join } from 'node:path'
import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { forgetLoosePhotos, LOOSE_PHOTO_DAYS } from '../../../server/db/commands/forgetLoosePhotos'
import { PHOTO_OWNERS } from '../../../server/db/queries/photos'
import { newId } from '../../../server/utils/newId'
import { folderStore } from '../../../server/utils/photoStore'
import type { PhotoRef } from '../../../shared/types/photo'
import { drawnPhoto, photoForm, plantCeilingHome, type CeilingHome } from '../../support/ceilingHome'
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

async function send(seed: number, daysAgo: number) {
  const { body } = await home.tenant.post<PhotoRef>(`/api/units/${home.unitId}/photos`, photoForm(await drawnPhoto(seed)))
  const { storedKey } = await home.db.updateTable('photo').set({ uploadedAt: new Date(Date.now() - daysAgo * 86_400_000).toISOString() })
    .where('id', '=', body.id).returning('storedKey').executeTakeFirstOrThrow()
  return { id: body.id, folder: join(server.dataDir, 'photos', storedKey) }
}
const fileOf = ({ folder }: { folder: string }) => join(folder, 'full.jpg')

describe('photos that no report or reading ever named', () => {
  it('are removed with their files after a month; fresh and named ones stay', async () => {
    const [old, fresh, named] = [await send(1, LOOSE_PHOTO_DAYS + 1), await send(2, LOOSE_PHOTO_DAYS - 1), await send(3, 0)]
    await home.tenant.post(`/api/units/${home.unitId}/observations`, {
      kind: 'crack', roomId: home.bedroomId, shape: 'wandering-line', widthComparison: 'card', photoIds: [named.id],
    }, { headers: { 'idempotency-key': newId() } })
    await home.db.updateTable('photo').set({ uploadedAt: '2020-01-01T00:00:00Z' }).where('id', '=', named.id).execute()
    expect(existsSync(fileOf(old))).toBe(true)
    expect(await forgetLoosePhotos(home.db, folderStore(join(server.dataDir, 'photos')))).toBe(1)
    const left = await home.db.selectFrom('photo').select('id').execute()
    expect(left.map(photo => photo.id).sort()).toEqual([fresh.id, named.id].sort())
    expect([old, fresh, named].map(photo => existsSync(fileOf(photo)))).toEqual([false, true, true])
  })

  it('are those whose every column that names an owner is empty', async () => {
    const { rows } = await sql<{ name: string }>`select column_name as name from information_schema.columns where table_name = 'photo' and column_name like '%\\_id'`.execute(home.db)
    const owners = rows.map(row => row.name).filter(name => !['organisation_id', 'unit_id'].includes(name))
    expect([...PHOTO_OWNERS].map(name => name.replace(/[A-Z]/g, letter => `_${letter.toLowerCase()}`)).sort()).toEqual(owners.sort())
  })
})
