import { visibleUnits } from '../../db/queries/actor'
import { listMarks } from '../../db/queries/marks'
import { MarkListQuery } from '../../../shared/schemas/mark'
import { apiRoute } from '../../utils/apiRoute'
import { dayIn } from '../../utils/clock'
import { asPage } from '../../utils/keyset'

export default apiRoute({
  can: 'see mark',
  query: MarkListQuery,
  handle: async ({ db, actor, query }) => {
    const rows = await listMarks(db, { organisationId: actor.organisationId, units: visibleUnits(actor), today: dayIn(actor.timeZone) }, query)
    return asPage(rows, query.limit, row => [row.rank, row.number])
  },
})
