import { liftNotice } from '../../../db/commands/liftNotice'
import { LiftingInput } from '../../../../shared/schemas/notice'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'raise notice',
  on: { notice: 'noticeId' },
  body: LiftingInput,
  handle: ({ db, actor, notice, body }) => liftNotice(db, actor, notice, body),
})
