import { readReportForm } from '../../../../db/queries/readReportForm'
import { PaperQuery } from '../../../../../shared/schemas/paper'
import { apiRoute } from '../../../../utils/apiRoute'
import { reportFormPdf } from '../../../../utils/papers/reportForm'
import { sendPaper } from '../../../../utils/pdf/sendPaper'
import { shippedFonts } from '../../../../utils/pdf/shippedFonts'

export default apiRoute({
  can: 'report observation',
  on: { unit: 'unitId' },
  query: PaperQuery,
  handle: async ({ event, db, actor, unit, query }) =>
    sendPaper(event, await reportFormPdf(await readReportForm(db, actor, unit.id, query.paper), await shippedFonts()), 'report form'),
})
