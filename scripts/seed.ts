import { mkdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { connect, type Db } from '../server/db/connect'
import { reviewOrganisation } from '../server/db/commands/reviewOrganisation'
import { dayIn } from '../server/utils/clock'
import { folderStore } from '../server/utils/photoStore'
import { endDemoTime, setDemoDay, daysBack } from './seed/demoClock'
import { PROPERTIES } from './seed/homes'
import { atticSteps, plantProperty } from './seed/plantHomes'
import { jobSteps } from './seed/plantJobs'
import { markSteps } from './seed/plantMarks'
import { noticeSteps } from './seed/plantNotices'
import { DEMO_PASSWORD, plantPeople } from './seed/plantPeople'
import { trialSteps } from './seed/plantTrials'
import { seeded } from './seed/readings'
import { ORGANISATION, PEOPLE } from './seed/scenario'
import { HOUSE_AGE_DAYS, playSteps, type Step } from './seed/steps'

/** Fills an empty database with the invented demo: `node --import tsx scripts/seed.ts --if-empty`. */

const STORY_SEED = 20260301
/** Mail older than this was read long ago; it is kept as sent and not sent again. */
const FRESH_MAIL_DAYS = 2

async function plantDemo(db: Db, photoDir: string) {
  const today = dayIn(ORGANISATION.timeZone)
  const store = folderStore(photoDir)
  const random = seeded(STORY_SEED)
  setDemoDay(daysBack(today, HOUSE_AGE_DAYS))
  const cast = await plantPeople(db)
  const steps: Step[] = []
  const homes = []
  for (const [number, property] of PROPERTIES.entries()) {
    for (const home of await plantProperty({ db, cast, today }, property)) {
      homes.push({ ...home, property: number })
      const attic = await db.selectFrom('attic').select('id').where('unitId', '=', home.unit.id).executeTakeFirst()
      if (attic && home.demo.attic) steps.push(...atticSteps({ db, cast, today }, attic.id, home.demo.attic, home.demo.tenant))
      for (const mark of home.demo.marks) steps.push(...markSteps({ db, store, cast, random }, home, mark))
    }
  }
  await playSteps(today, [...steps, ...jobSteps({ db, cast, homes }), ...noticeSteps({ db, cast, homes }), ...trialSteps({ db, cast, homes })])
  endDemoTime()
  await db.updateTable('message').set({ state: 'sent', sentAt: eb => eb.ref('createdAt') })
    .where('createdAt', '<', new Date(Date.now() - FRESH_MAIL_DAYS * 86_400_000).toISOString()).execute()
  // The story's today has its own hours; what is fresh goes out as soon as a server runs.
  await db.updateTable('message').set({ nextAttemptAt: new Date().toISOString() }).where('state', '=', 'queued').execute()
  await reviewOrganisation(db, cast.maren!.organisationId, {})
}

function writeSignIns(dataDir: string) {
  mkdirSync(dataDir, { recursive: true })
  writeFileSync(join(dataDir, 'demo-sign-ins.json'), JSON.stringify(PEOPLE.map(({ name, email, role }) => ({ name, email, role, password: DEMO_PASSWORD })), null, 2))
}

const url = process.env.DATABASE_URL
if (!url) throw new Error('Set DATABASE_URL to the database to fill.')
const dataDir = process.env.DATA_DIR ?? '.data'
const { db, close } = connect(url, { max: 4 })
try {
  const filled = await db.selectFrom('organisation').select('id').limit(1).executeTakeFirst()
  if (filled && !process.argv.includes('--if-empty')) throw new Error('The database is not empty. The demo is only planted into an empty one.')
  if (!filled) {
    await plantDemo(db, process.env.PHOTO_DIR ?? join(dataDir, 'photos'))
    writeSignIns(dataDir)
  }
}
finally {
  await close()
}
