import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import S3rver from 's3rver'

export interface FakeS3 {
  endpoint: string
  region: string
  bucket: string
  accessKeyId: string
  secretAccessKey: string
  close: () => Promise<void>
}

/**
 * Speaks the S3 interface on loopback, with one bucket, keeping objects in a folder that is removed at the end.
 * Its client must set requestChecksumCalculation and responseChecksumValidation to 'WHEN_REQUIRED' and forcePathStyle to true:
 * this server keeps the framing of streamed checksums as if it were content.
 */
export async function startFakeS3({ port = 0, bucket = 'lathkey-photos' }: { port?: number, bucket?: string } = {}): Promise<FakeS3> {
  const directory = await mkdtemp(join(tmpdir(), 'lathkey-s3-'))
  const server = new S3rver({
    address: '127.0.0.1', port, silent: true, directory, configureBuckets: [{ name: bucket, configs: [] }],
  })
  const address = await server.run()
  return {
    endpoint: `http://127.0.0.1:${address.port}`,
    region: 'us-east-1',
    bucket,
    // The one pair s3rver knows.
    accessKeyId: 'S3RVER',
    secretAccessKey: 'S3RVER',
    close: async () => {
      await server.close()
      await rm(directory, { recursive: true, force: true })
    },
  }
}
