import { mkdtemp, readdir, rm, stat } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startFakeS3, type FakeS3 } from '../../fakes/photoStore/startFakeS3'
import { bucketStore, folderStore, photoStoreFrom, type PhotoStore } from '../../server/utils/photoStore'

let folder: string
let fake: FakeS3
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'lathkey-photos-'))
  fake = await startFakeS3()
})
afterAll(async () => {
  await fake.close()
  await rm(folder, { recursive: true, force: true })
})

/** One contract, both stores: whoever uses a photo store need not know which it is. */
describe.each<[string, () => PhotoStore]>([
  ['files in a folder', () => folderStore(folder)],
  ['a bucket behind the S3 interface', () => bucketStore(fake)],
])('a photo store of %s', (_kind, open) => {
  const bytes = Buffer.from(Array.from({ length: 70_000 }, (_, i) => i % 251))

  it('gives back exactly what was put', async () => {
    await open().put('org/one/full.jpg', bytes, 'image/jpeg')
    expect((await open().get('org/one/full.jpg'))?.equals(bytes)).toBe(true)
  })

  it('puts again over what was there', async () => {
    await open().put('org/two/thumb.webp', bytes, 'image/webp')
    await open().put('org/two/thumb.webp', Buffer.from('newer'), 'image/webp')
    expect((await open().get('org/two/thumb.webp'))?.toString()).toBe('newer')
  })

  it('has nothing under a key nobody put', async () => {
    expect(await open().get('org/nobody/full.jpg')).toBeUndefined()
  })

  it('forgets what is deleted, and does not mind being asked twice', async () => {
    await open().put('org/three/full.jpg', bytes, 'image/jpeg')
    await open().delete('org/three/full.jpg')
    await open().delete('org/three/full.jpg')
    expect(await open().get('org/three/full.jpg')).toBeUndefined()
  })

  it('refuses keys that are not its own', async () => {
    for (const key of ['../outside', '/etc/passwd', 'a//b', 'a/../b', '', 'a/..', 'org/\u0000', `${'a'.repeat(301)}`]) {
      await expect((async () => open().put(key, bytes, 'image/jpeg'))()).rejects.toThrow(RangeError)
    }
  })
})

describe('the folder', () => {
  it('leaves no half-written file behind and keeps files from others', async () => {
    const store = folderStore(folder)
    await Promise.all(Array.from({ length: 8 }, (_, i) => store.put('org/race/full.jpg', Buffer.from(`writer ${i}`), 'image/jpeg')))
    expect(await readdir(join(folder, 'org/race'))).toEqual(['full.jpg'])
    expect((await store.get('org/race/full.jpg'))?.toString()).toMatch(/^writer \d$/)
    expect((await stat(join(folder, 'org/race/full.jpg'))).mode & 0o007).toBe(0)
  })
})

describe('photoStoreFrom', () => {
  it('keeps files under PHOTO_DIR, else in the data folder', async () => {
    await photoStoreFrom({ PHOTO_DIR: join(folder, 'own') }).put('a/full.jpg', Buffer.from('x'), 'image/jpeg')
    await photoStoreFrom({ DATA_DIR: folder }).put('b/full.jpg', Buffer.from('x'), 'image/jpeg')
    expect((await stat(join(folder, 'own/a/full.jpg'))).size).toBe(1)
    expect((await stat(join(folder, 'photos/b/full.jpg'))).size).toBe(1)
  })

  it('uses a bucket by configuration and says what is missing', async () => {
    const env = { PHOTO_STORE: 's3', S3_ENDPOINT: fake.endpoint, S3_BUCKET: fake.bucket, S3_ACCESS_KEY_ID: fake.accessKeyId, S3_SECRET_ACCESS_KEY: fake.secretAccessKey }
    const store = photoStoreFrom(env)
    await store.put('configured/full.jpg', Buffer.from('in the bucket'), 'image/jpeg')
    expect((await bucketStore(fake).get('configured/full.jpg'))?.toString()).toBe('in the bucket')
    expect(() => photoStoreFrom({ ...env, S3_BUCKET: '' })).toThrow('S3_BUCKET must be set')
  })
})
