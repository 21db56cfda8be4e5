import { randomUUID } from 'node:crypto'
import { mkdir, open, readFile, rename, rm } from 'node:fs/promises'
import { dirname, join, resolve } from 'node:path'

/** Where photo bytes are kept. The database knows the keys; nobody else does. */
export interface PhotoStore {
  put: (key: string, bytes: Uint8Array, mediaType: string) => Promise<void>
  /** Undefined when nothing is kept under this key. */
  get: (key: string) => Promise<Buffer | undefined>
  /** Gone or never there are the same. */
  delete: (key: string) => Promise<void>
}

const KEY = /^[a-z0-9][a-z0-9_-]*(?:[/.][a-z0-9_-]+)*$/

/** Keys are made by the server; this guards the disk should that ever change. */
function sound(key: string): string {
  if (!KEY.test(key) || key.length > 300) throw new RangeError(`Not a key of the photo store: ${JSON.stringify(key)}`)
  return key
}

/** Files under one folder. A file appears whole or not at all: written beside its place, flushed, then renamed. */
export function folderStore(folder: string): PhotoStore {
  const root = resolve(folder)
  const pathOf = (key: string) => join(root, sound(key))
  return {
    async put(key, bytes) {
      const path = pathOf(key)
      await mkdir(dirname(path), { recursive: true })
      const part = `${path}.${randomUUID()}.part`
      try {
        const file = await open(part, 'wx', 0o640)
        try {
          await file.writeFile(bytes)
          await file.sync()
        }
        finally {
          await file.close()
        }
        await rename(part, path)
      }
      catch (error) {
        await rm(part, { force: true })
        throw error
      }
    },
    async get(key) {
      try { return await readFile(pathOf(key)) }
      catch (error) {
        if ((error as NodeJS.ErrnoException).code === 'ENOENT') return undefined
        throw error
      }
    },
    delete: key => rm(pathOf(key), { force: true }),
  }
}

export interface BucketSettings {
  endpoint?: string
  region?: string
  bucket: string
  accessKeyId: string
  secretAccessKey: string
  /** Most stores that are not Amazon's want the bucket in the path. */
  pathStyle?: boolean
}

/** Any store that speaks the S3 API. The client is loaded when first used. */
export function bucketStore(settings: BucketSettings): PhotoStore {
  let opened: ReturnType<typeof openBucket> | undefined
  const use = () => opened ??= openBucket(settings)
  return {
    async put(key, bytes, mediaType) {
      const { client, sdk } = await use()
      await client.send(new sdk.PutObjectCommand({ Bucket: settings.bucket, Key: sound(key), Body: bytes, ContentType: mediaType, ContentLength: bytes.byteLength }))
    },
    async get(key) {
      const { client, sdk } = await use()
      try {
        const found = await client.send(new sdk.GetObjectCommand({ Bucket: settings.bucket, Key: sound(key) }))
        return Buffer.from(await found.Body!.transformToByteArray())
      }
      catch (error) {
        const { name, $metadata } = error as { name?: string, $metadata?: { httpStatusCode?: number } }
        if (name === 'NoSuchKey' || $metadata?.httpStatusCode === 404) return undefined
        throw error
      }
    },
    async delete(key) {
      const { client, sdk } = await use()
      await client.send(new sdk.DeleteObjectCommand({ Bucket: settings.bucket, Key: sound(key) }))
    },
  }
}

async function openBucket(settings: BucketSettings) {
  const sdk = await import('@aws-sdk/client-s3')
  const client = new sdk.S3Client({
    endpoint: settings.endpoint, region: settings.region ?? 'us-east-1', forcePathStyle: settings.pathStyle ?? settings.endpoint !== undefined,
    credentials: { accessKeyId: settings.accessKeyId, secretAccessKey: settings.secretAccessKey },
    // Otherwise checksum framing is stored as part of the file by stores that do not know it.
    requestChecksumCalculation: 'WHEN_REQUIRED', responseChecksumValidation: 'WHEN_REQUIRED',
  })
  return { sdk, client }
}

/** The store the environment asks for: files under PHOTO_DIR (DATA_DIR/photos), or a bucket with PHOTO_STORE=s3. */
export function photoStoreFrom(env: Record<string, string | undefined>): PhotoStore {
  if (env.PHOTO_STORE !== 's3') return folderStore(env.PHOTO_DIR || join(env.DATA_DIR || '.data', 'photos'))
  const needed = (name: string) => {
    const value = env[name]
    if (!value) throw new Error(`PHOTO_STORE is s3, so ${name} must be set.`)
    return value
  }
  return bucketStore({
    endpoint: env.S3_ENDPOINT || undefined, region: env.S3_REGION || undefined, bucket: needed('S3_BUCKET'),
    accessKeyId: needed('S3_ACCESS_KEY_ID'), secretAccessKey: needed('S3_SECRET_ACCESS_KEY'),
    pathStyle: env.S3_PATH_STYLE ? env.S3_PATH_STYLE === 'yes' : undefined,
  })
}

let store: PhotoStore | undefined

/** The process's one store. */
export const usePhotoStore = (): PhotoStore => store ??= photoStoreFrom(process.env)
