import { apiRoute } from '../../../utils/apiRoute'
import { usePhotoStore } from '../../../utils/photoStore'
import { notFound } from '../../../utils/problems'

/** The paper itself, as a download: never shown inside our own pages. */
export default apiRoute({
  can: 'see attic',
  on: { document: 'documentId' },
  handle: async ({ event, document }) => {
    const stored = await usePhotoStore().get(document.storedKey)
    if (!stored) throw notFound()
    setResponseHeaders(event, {
      'content-type': document.mediaType,
      'content-disposition': `attachment; filename*=UTF-8''${encodeURIComponent(document.fileName)}`,
      'content-security-policy': 'default-src \'none\'; sandbox',
    })
    return stored
  },
})
