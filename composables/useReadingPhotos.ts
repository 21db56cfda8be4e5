import { v4 as newId } from 'uuid'
import { computed, onBeforeUnmount, reactive, ref } from 'vue'
import { readProblem } from '~/composables/formProblem'
import { readablePhoto } from '~/composables/report/readablePhoto'
import { uploadPhoto } from '~/composables/report/uploadPhoto'
import { MAX_PHOTOS_PER_REPORT } from '~/shared/types/photo'
import type { DraftPhoto } from '~/shared/types/reportDraft'

/** Statuses that say something about the picture itself; all others may pass. */
const ABOUT_THE_PICTURE = [400, 413, 415, 422]

interface ReadingPhotosOptions { read?: typeof readablePhoto, send?: typeof uploadPhoto }

/** Photos that go along with one reading: sent as soon as they are chosen, kept while the page stands. */
export function useReadingPhotos(unitId: string, { read = readablePhoto, send = uploadPhoto }: ReadingPhotosOptions = {}) {
  const photos = ref<DraftPhoto[]>([])
  const pictures = new Map<string, Blob>()
  const shares = reactive<Record<string, number>>({})
  const previews = reactive<Record<string, string>>({})
  /** What the camera's own clock said, of each photo the server has. */
  const cameraTimes = reactive<Record<string, string | null>>({})
  const room = computed(() => MAX_PHOTOS_PER_REPORT - photos.value.length)
  const change = (localId: string, changes: Partial<DraftPhoto>) => {
    photos.value = photos.value.map(photo => photo.localId === localId ? { ...photo, ...changes } : photo)
  }

  async function upload({ localId, view }: DraftPhoto): Promise<boolean> {
    shares[localId] = 0
    try {
      const { id, cameraTime } = await send(unitId, pictures.get(localId)!, view, (share) => { shares[localId] = share })
      cameraTimes[localId] = cameraTime
      change(localId, { state: 'uploaded', photoId: id, problem: null })
      return true
    }
    catch (error) {
      const { status, message } = readProblem(error)
      const isRefused = ABOUT_THE_PICTURE.includes(status)
      change(localId, isRefused ? { state: 'refused', problem: message } : { problem: status === 429 ? message : null })
      return isRefused
    }
    finally { Reflect.deleteProperty(shares, localId) }
  }

  /** False as soon as one has to wait for a better moment. */
  async function uploadAll(): Promise<boolean> {
    for (const photo of photos.value.filter(({ state, localId }) => state === 'kept' && shares[localId] === undefined)) if (!await upload(photo)) return false
    return true
  }

  async function add(files: readonly File[], view: DraftPhoto['view']) {
    for (const file of files.slice(0, room.value)) {
      const localId = newId()
      const readable = await read(file)
      if (readable.kind === 'photo') {
        pictures.set(localId, readable.picture)
        previews[localId] = URL.createObjectURL(readable.picture)
      }
      photos.value = [...photos.value, { localId, view, name: file.name, state: readable.kind === 'photo' ? 'kept' : 'refused', photoId: null, problem: readable.kind === 'photo' ? null : readable.why }]
    }
    await uploadAll()
  }

  function remove(localId: string) {
    if (previews[localId]) URL.revokeObjectURL(previews[localId])
    Reflect.deleteProperty(previews, localId)
    Reflect.deleteProperty(cameraTimes, localId)
    pictures.delete(localId)
    photos.value = photos.value.filter(photo => photo.localId !== localId)
  }

  onBeforeUnmount(() => Object.values(previews).forEach(address => URL.revokeObjectURL(address)))
  return { photos, room, shares, previews, cameraTimes, add, remove, uploadAll }
}
