import { DeleteObjectCommand, GetObjectCommand, PutObjectCommand, S3Client } from '@aws-sdk/client-s3'
import { createHash, randomBytes } from 'node:crypto'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { startFakeS3, type FakeS3 } from '../../fakes/photoStore/startFakeS3'

let store: FakeS3
let client: S3Client
beforeAll(async () => {
  store = await startFakeS3()
  const { endpoint, region, accessKeyId, secretAccessKey } = store
  client = new S3Client({
    endpoint, region, credentials: { accessKeyId, secretAccessKey }, forcePathStyle: true,
    requestChecksumCalculation: 'WHEN_REQUIRED', responseChecksumValidation: 'WHEN_REQUIRED', maxAttempts: 1,
  })
})
afterAll(async () => {
  client.destroy()
  await store.close()
})

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex')

test('bytes come back exactly as they were put', async () => {
  const bytes = randomBytes(300_000)
  await client.send(new PutObjectCommand({ Bucket: store.bucket, Key: 'unit/1/photo.webp', Body: bytes, ContentType: 'image/webp' }))
  const got = await client.send(new GetObjectCommand({ Bucket: store.bucket, Key: 'unit/1/photo.webp' }))
  const returned = await got.Body?.transformToByteArray()
  expect(got.ContentType).toBe('image/webp')
  expect(returned && sha256(returned)).toBe(sha256(bytes))
})

test('what was removed, and what never was, is missing by the name S3 gives it', async () => {
  await client.send(new PutObjectCommand({ Bucket: store.bucket, Key: 'gone', Body: 'x' }))
  await client.send(new DeleteObjectCommand({ Bucket: store.bucket, Key: 'gone' }))
  for (const key of ['gone', 'never']) {
    await expect(client.send(new GetObjectCommand({ Bucket: store.bucket, Key: key }))).rejects.toMatchObject({ name: 'NoSuchKey' })
  }
})

test('a stranger\'s key is turned away', async () => {
  const stranger = new S3Client({ endpoint: store.endpoint, region: store.region, credentials: { accessKeyId: 'STRANGER', secretAccessKey: 'x' }, forcePathStyle: true, maxAttempts: 1 })
  await expect(stranger.send(new GetObjectCommand({ Bucket: store.bucket, Key: 'unit/1/photo.webp' }))).rejects.toMatchObject({ name: 'InvalidAccessKeyId' })
  stranger.destroy()
})
