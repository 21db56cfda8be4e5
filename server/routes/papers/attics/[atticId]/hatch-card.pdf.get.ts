import { readHatchCard } from '../../../../db/queries/readHatchCard'
import { PaperQuery } from '../../../../../shared/schemas/paper'
import { apiRoute } from '../../../../utils/apiRoute'
import { hatchCardPdf } from '../../../../utils/papers/hatchCard'
import { sendPaper } from '../../../../utils/pdf/sendPaper'
import { shippedFonts } from '../../../../utils/pdf/shippedFonts'

export default apiRoute({
  can: 'see attic',
  on: { attic: 'atticId' },
  query: PaperQuery,
  handle: async ({ event, db, actor, attic, query }) => {
    const card = await readHatchCard(db, actor, attic, query.paper)
    return sendPaper(event, await hatchCardPdf(card, await shippedFonts()), `hatch card ${card.attic}`)
  },
})
