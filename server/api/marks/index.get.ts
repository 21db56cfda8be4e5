import { visibleUnits } from '../../db/queries/actor'
import { listMarks } from '../../db/queries/marks'
import { MarkListQuery } from '../../../shared/schemas/mark'
import { apiRoute } from '../../utils/apiRoute'
import { dayIn } from '../../utils/clock'

export default apiRoute({
  can: 'see mark',
  query: MarkListQuery,
  kept: true,
  handle: async ({ db, actor, query }) => {
    const today = dayIn(actor.timeZone)
    return { ...await listMarks(db, { organisationId: actor.organisationId, units: visibleUnits(actor), today }, query), today }
  },
})
