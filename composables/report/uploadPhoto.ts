import type { DraftPhoto } from '~/shared/types/reportDraft'
import type { PhotoRef } from '~/shared/types/photo'

/** Ours: a slow line gets two minutes for one picture. */
const TIMEOUT_MS = 120_000

/** XMLHttpRequest, because fetch does not tell how much of a picture has left the phone. Throws what readProblem() reads. */
export function uploadPhoto(unitId: string, picture: Blob, view: DraftPhoto['view'], onShare: (share: number) => void): Promise<PhotoRef> {
  const form = new FormData()
  form.set('view', view)
  form.set('photo', picture, 'photo')
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest()
    request.open('POST', `/api/units/${unitId}/photos`)
    request.responseType = 'json'
    request.timeout = TIMEOUT_MS
    request.upload.onprogress = ({ lengthComputable, loaded, total }) => lengthComputable && onShare(loaded / total)
    request.onload = () => request.status >= 200 && request.status < 300
      ? resolve(request.response as PhotoRef)
      : reject({ statusCode: request.status, data: request.response as unknown })
    request.onerror = request.ontimeout = request.onabort = () => reject({ statusCode: 0 })
    request.send(form)
  })
}
