import { keepDocument } from '../../../db/commands/keepDocument'
import { apiRoute } from '../../../utils/apiRoute'
import { usePhotoStore } from '../../../utils/photoStore'
import { readDocument } from '../../../utils/readDocument'

export default apiRoute({
  can: 'edit attic',
  on: { attic: 'atticId' },
  handle: async ({ event, db, actor, attic }) => {
    const { input, file } = await readDocument(event)
    return keepDocument(db, usePhotoStore(), actor, attic, input, file)
  },
})
