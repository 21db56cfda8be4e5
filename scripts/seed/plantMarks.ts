import type { Db } from '../../server/db/connect'
import { editMark } from '../../server/db/commands/editMark'
import { recordReading } from '../../server/db/commands/recordReading'
import { reportObservation } from '../../server/db/commands/reportObservation'
import { storePhoto } from '../../server/db/commands/storePhoto'
import { things } from '../../server/db/queries/things'
import { newId } from '../../server/utils/newId'
import type { PhotoStore } from '../../server/utils/photoStore'
import { ObservationInput } from '../../shared/schemas/observation'
import { ReadingInput } from '../../shared/schemas/reading'
import type { MarkKind, ReadingMethod } from '../../shared/types/mark'
import { drawPhoto } from './drawPhoto'
import type { PlantedUnit } from './plantHomes'
import type { Cast } from './plantPeople'
import { demoReadings } from './readings'
import type { DemoMark } from './scenario'
import type { Step } from './steps'

interface Plot { db: Db, store: PhotoStore, cast: Cast, random: () => number }

const METHODS: Record<MarkKind, ReadingMethod> = { 'crack': 'gauge-card', 'nail-pops': 'count', 'sag': 'string-line', 'stain': 'ruler' }
const SAG_SPAN_MM = 3000

/** A mark from its report to its last reading, as steps in time; photos with the report and with the last reading. */
export function markSteps(plot: Plot, home: PlantedUnit, mark: DemoMark): Step[] {
  const { db, cast, random } = plot
  const person = home.demo.tenant ? cast[home.demo.tenant]! : cast.pia!
  const readings = demoReadings(mark, random)
  const pin = { xShare: 0.2 + 0.6 * random(), yShare: 0.25 + 0.5 * random() }
  let markId = ''
  const photos = async (value: number, views: ('wide' | 'close')[]) => {
    const ids: string[] = []
    for (const view of views) ids.push((await storePhoto(db, plot.store, person, home.unit, { bytes: await drawPhoto(mark, value, view, random), view })).id)
    return ids
  }
  const report: Step = {
    daysAgo: mark.sinceDaysAgo,
    run: async (on) => {
      const value = readings[0]!.value
      await reportObservation(db, person, home.unit, newId(), ObservationInput.parse({
        kind: mark.kind, roomId: home.roomIds[mark.room], pin, place: mark.place, shape: mark.shape, direction: 'across-joists', wallType: mark.place === 'wall-ceiling-corner' ? 'interior' : 'not-at-a-wall',
        ...sizeOf(mark, value), doors: 'no-change', changeAbove: 'not-known', firstSeenOn: on, note: 'Invented for the demo.', photoIds: await photos(value, ['wide', 'close']),
      }))
      const made = await db.selectFrom('mark').select('id').where('unitId', '=', home.unit.id).orderBy('number', 'desc').limit(1).executeTakeFirstOrThrow()
      markId = made.id
    },
  }
  const later: Step[] = readings.slice(1).map(({ daysAgo, value }, i) => ({
    daysAgo,
    run: async (on) => {
      const isLast = i === readings.length - 2
      await recordReading(db, person, (await things.mark(db, markId))!, newId(), ReadingInput.parse({
        takenOn: on, method: METHODS[mark.kind], value, spanMm: mark.kind === 'sag' ? SAG_SPAN_MM : null, stain: mark.stain ?? null,
        dangerSigns: isLast && mark.danger ? ['bulge-or-growing-sag', 'sounds-with-change'] : [], confirmed: true,
        photoIds: isLast ? await photos(value, ['close']) : [],
      }))
    },
  }))
  const repair: Step[] = mark.repairedDaysAgo === undefined
    ? []
    : [{
        daysAgo: mark.repairedDaysAgo,
        run: async (on) => {
          const row = (await things.mark(db, markId))!
          await editMark(db, cast.otis!, row, { version: row.version, change: { to: 'repaired', happenedOn: on, reason: 'Filled and painted (invented).' } })
        },
      }]
  return [report, ...later, ...repair]
}

function sizeOf(mark: DemoMark, value: number) {
  switch (mark.kind) {
    case 'crack': return { widthMm: value, widthMethod: 'gauge-card' as const, lengthMm: 600 }
    case 'nail-pops': return { popCount: value }
    case 'sag': return { sagDropMm: value, sagSpanMm: SAG_SPAN_MM }
    case 'stain': return { stain: mark.stain ?? 'dry' as const, stainSizeMm: value }
  }
}
