import type { Db } from '../../server/db/connect'
import { createJob } from '../../server/db/commands/createJob'
import { moveJob } from '../../server/db/commands/moveJob'
import { things } from '../../server/db/queries/things'
import { JobInput, JobMoveInput } from '../../shared/schemas/job'
import type { PlantedUnit } from './plantHomes'
import type { Cast } from './plantPeople'
import type { Step } from './steps'

interface DemoJob { property: number, unit: string, title: string, description: string, daysAgo: number, priority: 'danger' | 'urgent' | 'routine', doneDaysAgo?: number, costCents?: number, outcome?: string, toTrades?: true }

/** Invented work: done, planned, late and given to the trades. */
const JOBS: DemoJob[] = [
  { property: 0, unit: 'upper flat', title: 'Look at the living-room ceiling from below', description: 'Photos of the crack, wide and close, with a card beside it.', daysAgo: 20, priority: 'urgent', toTrades: true },
  { property: 1, unit: 'whole house', title: 'Make the stairs safe and find out why the ceiling hangs', description: 'Keep the stairs clear until a licensed engineer has looked.', daysAgo: 0, priority: 'danger', toTrades: true },
  { property: 2, unit: 'cottage', title: 'Fill and paint the loft-room crack', description: '', daysAgo: 130, priority: 'routine', doneDaysAgo: 120, costCents: 28_500, outcome: 'Raked out, filled, painted.', toTrades: true },
  { property: 3, unit: '2', title: 'Mend the living-room ceiling', description: 'Board joint opened twice.', daysAgo: 60, priority: 'routine', doneDaysAgo: 45, costCents: 61_200, outcome: 'Joint taped and finished.', toTrades: true },
  { property: 3, unit: '1', title: 'Look at the roof over the storage attic', description: 'Before the winter.', daysAgo: 50, priority: 'routine' },
  { property: 4, unit: 'A', title: 'Ask for the truss design drawings', description: 'The builder may still have them.', daysAgo: 12, priority: 'routine' },
  { property: 5, unit: 'rear', title: 'Find the old leak over the living room', description: 'The stain is dry; look at the flashing.', daysAgo: 200, priority: 'urgent', doneDaysAgo: 190, costCents: 19_000, outcome: 'Flashing renewed.' },
]

export function jobSteps({ db, cast, homes }: { db: Db, cast: Cast, homes: readonly (PlantedUnit & { property: number })[] }): Step[] {
  const otis = cast.otis!
  return JOBS.flatMap((job) => {
    const home = homes.find(one => one.property === job.property && one.demo.name === job.unit)
    if (!home) throw new Error(`The demo has no home "${job.unit}" for its job "${job.title}"`)
    let jobId = ''
    const plan: Step = {
      daysAgo: job.daysAgo,
      run: async () => {
        const { title, description, priority } = job
        const made = await createJob(db, otis, JobInput.parse({ unitId: home.unit.id, title, description, priority, assigneeUserId: job.toTrades ? cast.bram!.userId : null }))
        jobId = made.id
      },
    }
    if (job.doneDaysAgo === undefined) return [plan]
    return [plan, {
      daysAgo: job.doneDaysAgo,
      run: async (on: string) => {
        const row = (await things.job(db, jobId))!
        await moveJob(db, otis, row, JobMoveInput.parse({ version: row.version, to: 'done', doneOn: on, outcome: job.outcome, costCents: job.costCents }))
      },
    }]
  })
}
