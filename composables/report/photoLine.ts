import { readProblem } from '~/composables/formProblem'
import type { KeptPhotos } from '~/composables/report/keptPhotos'
import type { DraftPhoto } from '~/shared/types/reportDraft'

export const LOST_PHOTO = 'This picture is no longer on this phone. Please add it again.'
/** Statuses that say something about the picture itself; all others may pass. */
const ABOUT_THE_PICTURE = [400, 413, 415, 422]

interface PhotoLine {
  unitId: string
  kept: () => Promise<KeptPhotos>
  photos: () => readonly DraftPhoto[]
  /** Nothing happens to one that was removed meanwhile. */
  mark: (localId: string, changes: Partial<DraftPhoto>) => void
  /** How much of it has left the phone; null when it no longer moves. */
  onShare: (localId: string, share: number | null) => void
}

/** Sends kept photos one after the other, whoever asks and however often. */
export function formPhotoLine({ unitId, kept, photos, mark, onShare }: PhotoLine) {
  let line: Promise<unknown> = Promise.resolve()

  /** False when it has to wait for a better moment. */
  async function upload({ localId, view }: DraftPhoto): Promise<boolean> {
    const picture = await (await kept()).get(localId)
    if (!picture) {
      mark(localId, { state: 'refused', problem: LOST_PHOTO })
      return true
    }
    try {
      onShare(localId, 0)
      const { uploadPhoto } = await import('~/composables/report/uploadPhoto')
      const { id } = await uploadPhoto(unitId, picture, view, share => onShare(localId, share))
      mark(localId, { state: 'uploaded', photoId: id, problem: null })
      return true
    }
    catch (error) {
      const { status, message } = readProblem(error)
      const isRefused = ABOUT_THE_PICTURE.includes(status)
      mark(localId, isRefused ? { state: 'refused', problem: message } : { problem: status === 429 ? message : null })
      return isRefused
    }
    finally { onShare(localId, null) }
  }

  return function uploadAll(): Promise<boolean> {
    const next = line.then(async () => {
      for (const photo of photos()) if (photo.state === 'kept' && !await upload(photo)) return false
      return true
      // A part of the program that cannot be fetched is a line that is down.
    }).catch(() => false)
    line = next
    return next
  }
}
