import { execFile } from 'node:child_process'
import { existsSync, writeFileSync } from 'node:fs'
import { cp } from 'node:fs/promises'
import { join, resolve } from 'node:path'
import { promisify } from 'node:util'
import { inject } from 'vitest'
import { withLock } from '../../scripts/lib/lock.mjs'
import { connect } from '../../server/db/connect'
import { DEMO_PASSWORD } from '../../scripts/seed/plantPeople'
import { signIn, type Client } from './client'
import { cloneDatabase } from './database'
import { startServer, type TestServer } from './server'

const run = promisify(execFile)
const root = resolve(import.meta.dirname, '../..')

export interface DemoServer extends TestServer {
  as: (who: 'maren' | 'otis' | 'tomas' | 'wanda' | 'bram' | 'ines') => Promise<Client>
  /** Ids of the demo that pages are addressed by. */
  ids: Record<'property' | 'unit' | 'cottage' | 'cottageAttic' | 'attic' | 'item' | 'mark' | 'finding' | 'job' | 'observation' | 'notice' | 'trial', string>
}

const ADDRESSES = { maren: 'maren@quillbrook.example', otis: 'otis@quillbrook.example', tomas: 'tomas@tenants.example', wanda: 'wanda@tenants.example', bram: 'bram@plaster.example', ines: 'ines@structures.example' } as const

const demoName = 'lathkey_demo'

/** Planted once a run; a copy takes a hundredth of the time. Answers the folder with its photos. */
async function plantOnce(): Promise<string> {
  const photoDir = join(inject('testServices').folder, 'demo/photos')
  await withLock(`${photoDir}.lock`, async () => {
    if (existsSync(`${photoDir}.done`)) return
    const { appUrl } = await cloneDatabase({ as: demoName })
    await run(process.execPath, ['--import', 'tsx', 'scripts/seed.ts', '--if-empty'], {
      cwd: root, env: { ...process.env, DATABASE_URL: appUrl, DATA_DIR: join(photoDir, '..'), PHOTO_DIR: photoDir },
    })
    writeFileSync(`${photoDir}.done`, '')
  })
  return photoDir
}

/** A built server on a database with the invented demo planted in it. */
export async function startDemoServer(): Promise<DemoServer> {
  const photoDir = await plantOnce()
  const database = await cloneDatabase({ from: demoName })
  const server = await startServer({ database })
  await cp(photoDir, join(server.dataDir, 'photos'), { recursive: true })
  return {
    ...server, ids: await findIds(database.appUrl), as: who => signIn(server.url, { email: ADDRESSES[who], password: DEMO_PASSWORD }),
    stop: async () => {
      await server.stop()
      await database.drop()
    },
  }
}

/** All of one home, the upper flat with the loaded attic and the active crack, which is Tomas's. */
async function findIds(url: string): Promise<DemoServer['ids']> {
  const { db, close } = connect(url, { max: 1 })
  try {
    const unit = await db.selectFrom('unit').select(['id', 'propertyId']).where('name', '=', 'upper flat').executeTakeFirstOrThrow()
    const one = async (table: 'attic' | 'atticItem' | 'job' | 'observation' | 'finding') =>
      (await db.selectFrom(table).select('id').where('unitId', '=', unit.id).orderBy('id').limit(1).executeTakeFirstOrThrow()).id
    const mark = await db.selectFrom('mark').select('id').where('unitId', '=', unit.id).where('activity', '=', 'active').executeTakeFirstOrThrow()
    const cottage = await db.selectFrom('unit').select('id').where('name', '=', 'cottage').executeTakeFirstOrThrow()
    const cottageAttic = await db.selectFrom('attic').select('id').where('unitId', '=', cottage.id).executeTakeFirstOrThrow()
    const notice = await db.selectFrom('keepClearNotice').select('id').where('unitId', '=', unit.id).executeTakeFirstOrThrow()
    return {
      notice: notice.id, cottage: cottage.id, cottageAttic: cottageAttic.id, property: unit.propertyId, unit: unit.id, attic: await one('attic'), item: await one('atticItem'),
      mark: mark.id, trial: (await db.selectFrom('unloadTrial').select('id').orderBy('id').limit(1).executeTakeFirstOrThrow()).id, finding: await one('finding'), job: await one('job'), observation: await one('observation'),
    }
  }
  finally {
    await close()
  }
}
