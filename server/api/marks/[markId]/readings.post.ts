import { recordReading } from '../../../db/commands/recordReading'
import { ReadingInput } from '../../../../shared/schemas/reading'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'record reading',
  on: { mark: 'markId' },
  body: ReadingInput,
  handle: ({ db, actor, mark, clientKey, body }) => recordReading(db, actor, mark, clientKey, body),
})
