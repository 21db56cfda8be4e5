import type { Db } from '../../server/db/connect'
import { carryOutUnloadTrial } from '../../server/db/commands/carryOutUnloadTrial'
import { judgeHindsight } from '../../server/db/commands/judgeHindsight'
import { planUnloadTrial } from '../../server/db/commands/planUnloadTrial'
import { things } from '../../server/db/queries/things'
import { HindsightInput } from '../../shared/schemas/hindsight'
import { UnloadingInput, UnloadTrialInput } from '../../shared/schemas/unloadTrial'
import type { FindingRule } from '../../shared/types/finding'
import type { HindsightOutcome } from '../../shared/types/hindsight'
import { addDays } from '../../shared/utils/days'
import type { PlantedUnit } from './plantHomes'
import type { Cast } from './plantPeople'
import type { Step } from './steps'

interface DemoTrial { property: number, unit: string, item: string, purpose: string, daysAgo: number, plannedInDays: number, unloadedDaysAgo?: number }

/** Invented trials: one still to come under the crack that grows, one carried out and watched. */
const TRIALS: DemoTrial[] = [
  { property: 0, unit: 'upper flat', item: 'Carton of books', purpose: 'Does the living-room crack slow down once the books are out?', daysAgo: 1, plannedInDays: 4 },
  { property: 5, unit: 'rear', item: 'Tool chest', purpose: 'Does the bedroom crack rest without the chest above it?', daysAgo: 162, plannedInDays: 12, unloadedDaysAgo: 150 },
]

interface DemoHindsight { rule: FindingRule, subject: string, property: number, unit: string, daysAgo: number, outcome: HindsightOutcome, reason: string }

/** What turned out later about some findings, all invented. */
const HINDSIGHT: DemoHindsight[] = [
  { property: 0, unit: 'upper flat', rule: 'mark-active', subject: 'Crack, Living room', daysAgo: 15, outcome: 'right', reason: 'Seen from the ladder: the plaster has come off two laths along it.' },
  { property: 1, unit: 'whole house', rule: 'width-class-up', subject: 'Crack, Front bedroom', daysAgo: 190, outcome: 'wrong', reason: 'Read beside the wider end that day; the next reading was back.' },
  { property: 2, unit: 'cottage', rule: 'new-mark-under-load', subject: 'Crack, Parlour', daysAgo: 120, outcome: 'wrong', reason: 'A year of readings shows the season and nothing else.' },
  { property: 5, unit: 'rear', rule: 'new-mark-under-load', subject: 'Stain, Living room', daysAgo: 185, outcome: 'right', reason: 'It was a leak: the flashing had lifted.' },
]

interface Plot { db: Db, cast: Cast, homes: readonly (PlantedUnit & { property: number })[] }

function homeOf({ homes }: Plot, property: number, unit: string) {
  const home = homes.find(one => one.property === property && one.demo.name === unit)
  if (!home) throw new Error(`The demo has no home "${unit}"`)
  return home
}

function stepsOfTrial(plot: Plot, trial: DemoTrial): Step[] {
  const { db, cast } = plot
  const { unit } = homeOf(plot, trial.property, trial.unit)
  const otis = cast.otis!
  let trialId = ''
  const items = () => db.selectFrom('atticItem').select('id').where('unitId', '=', unit.id).where('name', 'like', `${trial.item}%`).where('removedOn', 'is', null).execute()
  const plan: Step = {
    daysAgo: trial.daysAgo,
    run: async (on) => {
      const attic = await db.selectFrom('attic').selectAll().where('unitId', '=', unit.id).executeTakeFirstOrThrow()
      const cracks = await db.selectFrom('mark').select('id').where('unitId', '=', unit.id).where('kind', '=', 'crack').execute()
      const made = await planUnloadTrial(db, otis, attic, UnloadTrialInput.parse({
        purpose: trial.purpose, plannedOn: addDays(on, trial.plannedInDays), itemIds: (await items()).map(item => item.id), markIds: cracks.map(mark => mark.id),
      }))
      trialId = made.id
    },
  }
  if (trial.unloadedDaysAgo === undefined) return [plan]
  return [plan, {
    daysAgo: trial.unloadedDaysAgo,
    run: async (on) => {
      const row = (await things.unloadTrial(db, trialId))!
      await carryOutUnloadTrial(db, otis, row, UnloadingInput.parse({ unloadedOn: on, itemIds: (await items()).map(item => item.id), version: row.version }))
    },
  }]
}

function stepOfHindsight(plot: Plot, { property, unit, rule, subject, daysAgo, outcome, reason }: DemoHindsight): Step {
  const { db, cast } = plot
  const home = homeOf(plot, property, unit)
  return {
    daysAgo,
    run: async () => {
      const finding = await db.selectFrom('finding as f').innerJoin('mark as m', 'm.id', 'f.subjectId').selectAll('f')
        .where('f.unitId', '=', home.unit.id).where('f.rule', '=', rule).where('m.label', '=', subject).orderBy('f.openedAt').executeTakeFirst()
      if (!finding) throw new Error(`The demo has no finding "${rule}" on "${subject}" to judge`)
      await judgeHindsight(db, cast.otis!, finding, HindsightInput.parse({ outcome, reason }))
    },
  }
}

/** Unload trials and findings judged later, as steps in time. */
export const trialSteps = (plot: Plot): Step[] => [...TRIALS.flatMap(trial => stepsOfTrial(plot, trial)), ...HINDSIGHT.map(judged => stepOfHindsight(plot, judged))]
