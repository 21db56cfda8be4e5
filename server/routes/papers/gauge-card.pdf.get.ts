import { findPaperReader } from '../../db/queries/paperReader'
import { PaperQuery } from '../../../shared/schemas/paper'
import { apiRoute } from '../../utils/apiRoute'
import { appUrl } from '../../utils/appUrl'
import { now } from '../../utils/clock'
import { gaugeCardPdf } from '../../utils/papers/gaugeCard'
import { sendPaper } from '../../utils/pdf/sendPaper'
import { shippedFonts } from '../../utils/pdf/shippedFonts'

export default apiRoute({ can: 'use account', query: PaperQuery, handle: async ({ event, db, actor, query }) => {
  const { size } = await findPaperReader(db, actor, query.paper)
  return sendPaper(event, await gaugeCardPdf({ size, url: appUrl('/gauge-card'), madeAt: now() }, await shippedFonts()), 'gauge card')
} })
