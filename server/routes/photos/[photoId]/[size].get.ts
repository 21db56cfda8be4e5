import { apiRoute } from '../../../utils/apiRoute'
import { sendPhoto } from '../../../utils/sendPhoto'
import { usePhotoStore } from '../../../utils/photoStore'

export default apiRoute({
  can: 'see mark',
  on: { photo: 'photoId' },
  handle: ({ event, photo }) => sendPhoto(event, usePhotoStore(), photo),
})
