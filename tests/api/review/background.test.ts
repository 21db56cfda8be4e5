import { setTimeout as wait } from 'node:timers/promises'
import { afterAll, describe, expect, it } from 'vitest'
import { findOrganisationsToReview } from '../../../server/db/queries/reviews'
import { reviewOrganisation } from '../../../server/db/commands/reviewOrganisation'
import { startJobQueue, type ReviewOrder } from '../../../server/utils/jobQueue'
import { cloneDatabase } from '../../support/database'
import { inventHome, openDatabase } from './inventHome'
import { openServer } from './openHome'

async function until(look: () => Promise<boolean> | boolean, ms = 30_000) {
  const deadline = Date.now() + ms
  while (!await look()) {
    if (Date.now() > deadline) throw new Error('It did not happen in time.')
    await wait(100)
  }
}

describe('the job queue', () => {
  it('starts by itself once a database that was away is back, does what is ordered and tries again what failed', async () => {
    const database = await cloneDatabase()
    await database.setReachable(false)
    const done: ReviewOrder[] = []
    let failures = 1
    const queue = startJobQueue(database.appUrl, {
      review: async (order) => {
        if (failures-- > 0) throw new Error('not this time')
        done.push(order)
      },
      reviewFailed: async () => {},
      mail: async () => {},
      tidy: async () => {},
    })
    await wait(500)
    expect(await queue.order('review', { organisationId: 'one' }, 'one')).toBe(false)
    await database.setReachable(true)
    await until(() => queue.order('review', { organisationId: 'one' }, 'one'))
    // One waiting order a key: a second server's clock adds nothing.
    await queue.order('review', { organisationId: 'one' }, 'one')
    await until(() => done.length > 0, 60_000)
    await wait(2_500)
    expect(done).toEqual([{ organisationId: 'one' }])
    await queue.stop()
    await database.drop()
  }, 120_000)
})

describe('organisations to review', () => {
  const offset = (hours: number) => { process.env.LATHKEY_CLOCK_OFFSET_MS = String(hours * 3_600_000) }
  afterAll(() => { delete process.env.LATHKEY_CLOCK_OFFSET_MS })

  it('are those whose hour has come in their own time zone and whose run of today is not done', async () => {
    const opened = await openDatabase()
    const [here, there] = [await inventHome(opened.db), await inventHome(opened.db)]
    // Noon in UTC; in Honolulu it is two at night.
    const noon = new Date()
    noon.setUTCHours(12, 0, 0, 0)
    const untilNoon = (noon.getTime() - Date.now()) / 3_600_000
    await opened.db.updateTable('organisation').set({ timeZone: 'Pacific/Honolulu' }).where('id', '=', there.organisationId).execute()
    const toReview = async () => (await findOrganisationsToReview(opened.db)).map(row => row.organisationId)
    offset(untilNoon)
    expect(await toReview()).toEqual([here.organisationId])
    await reviewOrganisation(opened.db, here.organisationId, { askedBy: here.owner })
    expect(await toReview()).toEqual([here.organisationId])
    await reviewOrganisation(opened.db, here.organisationId)
    expect(await toReview()).toEqual([])
    offset(untilNoon + 6)
    expect(await toReview()).toEqual([there.organisationId])
    offset(untilNoon + 24)
    expect(await toReview()).toContain(here.organisationId)
    delete process.env.LATHKEY_CLOCK_OFFSET_MS
    await opened.drop()
  })
})

describe('a server whose database goes away', () => {
  it('answers 503 with a time to try again, stays up, and works on when it is back', async () => {
    const open = await openServer()
    const home = await open.openHome()
    await open.server.database.setReachable(false)
    const away = await home.as.owner.get('/api/reviews')
    expect(away.status).toBe(503)
    expect(away.headers.get('retry-after')).toBe('5')
    await wait(3_000)
    await open.server.database.setReachable(true)
    await until(async () => (await home.as.owner.get('/api/reviews')).status === 200)
    const { body } = await home.as.owner.post<{ runId: string }>('/api/reviews')
    await until(async () => (await home.as.owner.get<{ runs: { id: string, finishedAt: string | null }[] }>('/api/reviews')).body.runs.some(run => run.id === body.runId && run.finishedAt !== null))
    const started = Date.now()
    await open.close()
    expect(Date.now() - started).toBeLessThan(12_000)
  }, 90_000)
})
