import pg from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { findStateSeen } from '../../server/db/queries/changes'
import { plantCeilingHome, type CeilingHome } from '../support/ceilingHome'
import { createClient } from '../support/client'
import { startServer, type TestServer } from '../support/server'

let server: TestServer
let home: CeilingHome
let outside: pg.Client
beforeAll(async () => {
  server = await startServer()
  home = await plantCeilingHome(server)
  outside = new pg.Client({ connectionString: server.database.ownerUrl })
  await outside.connect()
})
afterAll(async () => {
  await outside?.end()
  await home?.close()
  await server?.stop()
})

const anew = { headers: { 'cache-control': 'no-cache' } }
const unitPath = () => `/api/units/${home.unitId}`
const rename = (name: string) => outside.query('update unit set name = $1 where id = $2', [name, home.unitId])
const nameSeen = async (as = home.owner) => (await as.get<{ unit: { name: string } }>(unitPath())).body.unit.name
const state = async () => {
  const person = await home.db.selectFrom('appUser').select(['id as userId', 'sessionEpoch as epoch']).where('email', '=', home.ownerEmail).executeTakeFirstOrThrow()
  return findStateSeen(home.db, person)
}

/** While unit is locked for everybody, only what needs no look at it can be answered. */
async function whileUnitsAreLocked<T>(work: () => Promise<T>): Promise<T> {
  await outside.query('begin')
  try {
    await outside.query('lock table unit in access exclusive mode')
    return await work()
  }
  finally {
    await outside.query('rollback')
  }
}
/** A kept answer is for one minute of the clock; where that turns in between, it is made again once. */
async function kept<T>(make: () => Promise<T>): Promise<T | 'waited'> {
  for (let attempt = 1; ; attempt += 1) {
    await make()
    const seen = await whileUnitsAreLocked(() => withinASecond(make()))
    if (seen !== 'waited' || attempt === 2) return seen
  }
}
const withinASecond = <T>(work: Promise<T>) => Promise.race([work, new Promise<'waited'>(done => setTimeout(done, 1_000, 'waited'))])

describe('what changes in an organisation is counted', () => {
  it('in every table that says whose its rows are, on each kind of change', async () => {
    const { rows } = await outside.query<{ name: string, events: string[] }>(`
      select c.relname as name, array_agg(t.tgname::text order by t.tgname) filter (where t.tgname like 'follow\\_%') as events
      from pg_class c join pg_attribute a on a.attrelid = c.oid and a.attname = 'organisation_id' and not a.attisdropped
      left join pg_trigger t on t.tgrelid = c.oid
      where c.relkind = 'r' and c.relnamespace = 'public'::regnamespace and c.relname <> 'organisation_change' group by c.relname`)
    expect(rows.length).toBeGreaterThan(20)
    expect(rows.filter(({ events }) => events?.join() !== 'follow_delete,follow_insert,follow_update').map(row => row.name)).toEqual([])
  })

  it('once a transaction, seen when it commits, and not when it is given up', async () => {
    const before = await state()
    await outside.query('begin')
    await rename('First'); await rename('Second')
    expect(await state()).toBe(before)
    await outside.query('rollback')
    expect(await state()).toBe(before)
    await rename('Third')
    const [people, changes] = before!.split('.').map(Number)
    expect(await state()).toBe(`${people}.${changes! + 1}`)
  })

  it('for a person too, in the organisations they belong to', async () => {
    const before = await state()
    await outside.query('update app_user set name = name where email = $1', [home.ownerEmail])
    expect(await state()).not.toBe(before)
  })

  it('stands for nothing once the session has ended', async () => {
    const { id } = await home.db.selectFrom('appUser').select('id').where('email', '=', home.ownerEmail).executeTakeFirstOrThrow()
    expect(await findStateSeen(home.db, { userId: id, epoch: -1 })).toBeUndefined()
  })
})

describe('an answer made before', () => {
  it('comes again without being made again, unless it is asked for anew', async () => {
    await rename('Kept')
    expect(await kept(nameSeen)).toBe('Kept')
    expect(await whileUnitsAreLocked(() => withinASecond(home.owner.get(unitPath(), anew)))).toBe('waited')
  })

  it('is made again after any change, whoever wrote it', async () => {
    for (const name of ['One', 'Two', 'Three']) {
      await rename(name)
      expect(await nameSeen()).toBe(name)
    }
  })

  it('is the asker\'s alone', async () => {
    expect(await nameSeen()).toBe(await nameSeen(home.tenant))
    const [owners, tenants] = [await home.owner.get(unitPath()), await home.tenant.get(unitPath())]
    expect(tenants.body).not.toEqual(owners.body)
    expect((await home.stranger.get(unitPath())).status).toBe(404)
    expect((await createClient(server.url).get(unitPath())).status).toBe(401)
  })

  it('is JSON like the first', async () => {
    const [first, second] = [await home.owner.get(unitPath(), anew), await home.owner.get(unitPath())]
    expect(second.body).toEqual(first.body)
    expect(second.headers.get('content-type')).toContain('application/json')
    expect(second.headers.get('cache-control')).toBe('no-store')
  })
})

const pageOf = async (as = home.owner, headers: Record<string, string> = {}) => {
  const response = await as.send(`/units/${home.unitId}`, { headers: { accept: 'text/html', ...headers } })
  return { status: response.status, headers: response.headers, text: await response.text() }
}
const nonceOf = (headers: Headers) => /'nonce-([^']+)'/.exec(headers.get('content-security-policy') ?? '')?.[1]
const mainOf = ({ text }: { text: string }) => /<main[^]*<\/main>/.exec(text)![0]

describe('a page made before', () => {
  it('comes again while nothing has changed, with a nonce of its own', async () => {
    await rename('Page')
    const first = await pageOf(home.owner, anew.headers)
    const again = await kept(pageOf)
    if (again === 'waited') throw new Error('The page was made again.')
    expect(mainOf(again) === mainOf(first)).toBe(true)
    expect(nonceOf(again.headers)).toMatch(/^[\w+/]{22}==$/)
    expect(nonceOf(again.headers)).not.toBe(nonceOf(first.headers))
    const scripts = again.text.match(/<script[^>]*>/g)!
    expect(scripts.length).toBeGreaterThan(1)
    expect(scripts.filter(script => !script.includes(`nonce="${nonceOf(again.headers)}"`))).toEqual([])
  })

  it('is made again after a change', async () => {
    await pageOf()
    await rename('Renamed since')
    expect((await pageOf()).text).toContain('Renamed since')
  })

  it('is not shown to anybody else', async () => {
    await pageOf()
    expect((await pageOf(home.stranger)).status).toBe(404)
    expect((await pageOf(createClient(server.url))).status).toBe(302)
  })

  it('is not kept when a part of it could not be read', async () => {
    const missing = `/units/${home.unitId.replace(/^./, digit => digit === '0' ? '1' : '0')}`
    const statuses = []
    for (let time = 0; time < 2; time += 1) statuses.push((await home.owner.send(missing, { headers: { accept: 'text/html' } })).status)
    expect(statuses).toEqual([404, 404])
  })

  it('that everybody may see is the same for those without a session', async () => {
    const strangers = createClient(server.url)
    const [first, second] = [await (await strangers.send('/sign-in')).text(), await (await strangers.send('/sign-in')).text()]
    expect(second.length).toBe(first.length)
    expect(second).toContain('Sign in')
  })
})
