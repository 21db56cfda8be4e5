import type { Db } from '../../server/db/connect'
import { liftNotice } from '../../server/db/commands/liftNotice'
import { raiseNotice } from '../../server/db/commands/raiseNotice'
import { findOpenCauses } from '../../server/db/queries/notices'
import { things } from '../../server/db/queries/things'
import { NoticeInput } from '../../shared/schemas/notice'
import type { KeepClearCause } from '../../shared/types/notice'
import type { PlantedUnit } from './plantHomes'
import type { Cast } from './plantPeople'
import type { Step } from './steps'

interface DemoNotice { property: number, unit: string, room: number, cause: KeepClearCause, daysAgo: number, area?: string, lifted?: { daysAgo: number, reason: string } }

/** Invented notices for the rooms below: three that stand, one that was lifted. */
const NOTICES: DemoNotice[] = [
  { property: 0, unit: 'upper flat', room: 2, cause: 'attic-over', daysAgo: 20, area: 'The middle of the room, under the crack' },
  { property: 1, unit: 'whole house', room: 0, cause: 'danger-sign', daysAgo: 0 },
  { property: 2, unit: 'cottage', room: 1, cause: 'attic-on-hold', daysAgo: 110 },
  { property: 2, unit: 'cottage', room: 0, cause: 'attic-on-hold', daysAgo: 460, lifted: { daysAgo: 430, reason: 'Ines looked at it (invented): the notched joists lie over the loft room only.' } },
]

export function noticeSteps({ db, cast, homes }: { db: Db, cast: Cast, homes: readonly (PlantedUnit & { property: number })[] }): Step[] {
  const otis = cast.otis!
  return NOTICES.flatMap((demo) => {
    const home = homes.find(one => one.property === demo.property && one.demo.name === demo.unit)
    if (!home) throw new Error(`The demo has no home "${demo.unit}" for its notice`)
    let noticeId = ''
    const raise: Step = {
      daysAgo: demo.daysAgo,
      run: async () => {
        const roomId = home.roomIds[demo.room]!
        const found = (await findOpenCauses(db, { unitId: home.unit.id })).find(({ cause, roomId: below }) => cause === demo.cause && (below === null || below === roomId))
        if (!found) throw new Error(`Nothing in the demo's home "${demo.unit}" calls for a notice on that day`)
        const { atticId, findingId } = found
        noticeId = (await raiseNotice(db, otis, (await things.room(db, roomId))!, NoticeInput.parse({ atticId, findingId, area: demo.area }))).id
      },
    }
    const { lifted } = demo
    if (!lifted) return [raise]
    return [raise, { daysAgo: lifted.daysAgo, run: async () => void await liftNotice(db, otis, (await things.notice(db, noticeId))!, { reason: lifted.reason }) }]
  })
}
