import { readKeepClear } from '../../../../db/queries/readKeepClear'
import { PaperQuery } from '../../../../../shared/schemas/paper'
import { apiRoute } from '../../../../utils/apiRoute'
import { keepClearPdf } from '../../../../utils/papers/keepClear'
import { sendPaper } from '../../../../utils/pdf/sendPaper'
import { shippedFonts } from '../../../../utils/pdf/shippedFonts'

export default apiRoute({
  can: 'see notice',
  on: { notice: 'noticeId' },
  query: PaperQuery,
  handle: async ({ event, db, actor, notice, query }) =>
    sendPaper(event, await keepClearPdf(await readKeepClear(db, actor, notice.id, query.paper), await shippedFonts()), 'keep clear'),
})
