import { execFile } from 'node:child_process'
import { join, resolve } from 'node:path'
import { promisify } from 'node:util'
import { connect } from '../../server/db/connect'
import { DEMO_PASSWORD } from '../../scripts/seed/plantPeople'
import { signIn, type Client } from './client'
import { startServer, type TestServer } from './server'

const run = promisify(execFile)
const root = resolve(import.meta.dirname, '../..')

export interface DemoServer extends TestServer {
  as: (who: 'maren' | 'otis' | 'tomas' | 'wanda' | 'bram' | 'ines') => Promise<Client>
  /** Ids of the demo that pages are addressed by. */
  ids: Record<'property' | 'unit' | 'cottage' | 'cottageAttic' | 'attic' | 'item' | 'mark' | 'finding' | 'job' | 'observation', string>
}

const ADDRESSES = { maren: 'maren@quillbrook.example', otis: 'otis@quillbrook.example', tomas: 'tomas@tenants.example', wanda: 'wanda@tenants.example', bram: 'bram@plaster.example', ines: 'ines@structures.example' } as const

/** A built server on a database with the invented demo planted in it. */
export async function startDemoServer(): Promise<DemoServer> {
  const server = await startServer()
  await run(process.execPath, ['--import', 'tsx', 'scripts/seed.ts', '--if-empty'], {
    cwd: root, env: { ...process.env, DATABASE_URL: server.database.appUrl, DATA_DIR: server.dataDir, PHOTO_DIR: join(server.dataDir, 'photos') },
  })
  return { ...server, ids: await findIds(server.database.appUrl), as: who => signIn(server.url, { email: ADDRESSES[who], password: DEMO_PASSWORD }) }
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
    return {
      cottage: cottage.id, cottageAttic: cottageAttic.id, property: unit.propertyId, unit: unit.id, attic: await one('attic'), item: await one('atticItem'),
      mark: mark.id, finding: await one('finding'), job: await one('job'), observation: await one('observation'),
    }
  }
  finally {
    await close()
  }
}
