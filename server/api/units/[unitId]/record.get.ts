import { findRecordPage } from '../../../db/queries/record'
import { RecordQuery } from '../../../../shared/schemas/listQuery'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'see record',
  on: { unit: 'unitId' },
  query: RecordQuery,
  handle: ({ db, actor, unit, query }) => findRecordPage(db, actor, unit.id, query),
})
