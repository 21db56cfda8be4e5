import { judgeForReview } from '../server/db/commands/judgeForReview.ts'
import { reviewOrganisation } from '../server/db/commands/reviewOrganisation.ts'
import { connect, type Db } from '../server/db/connect.ts'
import { findUnitsAfter, findUnitsUnderReview } from '../server/db/queries/reviewing.ts'
import { fillHomesForReview } from './reviewHomes.ts'

/** Ours: how large a portfolio the daily review is measured on, and the most it may take (both asked for). */
const COUNTS = { units: Number(process.env.REVIEW_UNITS ?? 2000), marksEach: 5, readingsEach: 30, itemsEach: 8 }
const MOST_SECONDS = 60
const UNITS_IN_MEMORY = 200
const PURE_MS = 2_000

async function timed<T>(work: () => Promise<T>) {
  const startedAt = performance.now()
  const before = process.cpuUsage()
  const seen: number[] = []
  const watching = setInterval(() => seen.push(process.memoryUsage().rss / 2 ** 20), 50)
  const answer = await work()
  clearInterval(watching)
  const { user, system } = process.cpuUsage(before)
  const third = Math.max(1, Math.floor(seen.length / 3))
  return {
    answer, seconds: (performance.now() - startedAt) / 1000, processorSeconds: (user + system) / 1e6,
    firstThirdMb: Math.max(...seen.slice(0, third)), lastThirdMb: Math.max(...seen.slice(-third)),
  }
}

/** Marks a second when everything is in memory already and nothing is written: the same judging, without the database. */
async function pureMarksPerSecond(db: Db, organisationId: string): Promise<number> {
  const ids = (await findUnitsAfter(db, organisationId, undefined, UNITS_IN_MEMORY)).map(unit => unit.id)
  const units = await findUnitsUnderReview(db, organisationId, ids, { toWrite: false })
  let marks = 0
  const startedAt = performance.now()
  for (let i = 0; performance.now() - startedAt < PURE_MS; i++) marks += judgeForReview(units[i % units.length]!).marks.length
  return marks / ((performance.now() - startedAt) / 1000)
}

async function night(db: Db, organisationId: string, name: string, days: number) {
  process.env.LATHKEY_CLOCK_OFFSET_MS = String(days * 86_400_000)
  const { answer, ...run } = await timed(() => reviewOrganisation(db, organisationId))
  if (answer.kind !== 'reviewed') throw new Error(`The review of ${name} answered: ${answer.kind}`)
  const { marks, attics } = answer.counts
  return { name, marks, attics, marksPerSecond: marks / run.seconds, mostSeconds: MOST_SECONDS, ...run }
}

const owner = connect(process.env.DATABASE_OWNER_URL!, { max: 1 })
const organisationId = await fillHomesForReview(owner.db, COUNTS)
await owner.close()
const { db, close } = connect(process.env.DATABASE_URL!)
const nights = [
  await night(db, organisationId, 'first night, every finding new', 0),
  await night(db, organisationId, 'the night after', 1),
]
const pure = await pureMarksPerSecond(db, organisationId)
await close()
console.log(JSON.stringify({ nights, pureMarksPerSecond: pure }))
