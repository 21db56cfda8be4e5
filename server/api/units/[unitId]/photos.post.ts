import { storePhoto } from '../../../db/commands/storePhoto'
import { apiRoute } from '../../../utils/apiRoute'
import { usePhotoStore } from '../../../utils/photoStore'
import { readPhotoForm } from '../../../utils/readPhotoForm'

/** The body is read only once the asker is known and allowed: nobody else can make the server take 20 MB. */
export default apiRoute({
  can: 'add photo',
  on: { unit: 'unitId' },
  handle: async ({ event, db, actor, unit }) =>
    storePhoto(db, usePhotoStore(), actor, unit, await readPhotoForm(event)),
})
