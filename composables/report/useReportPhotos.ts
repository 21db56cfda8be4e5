import { v4 } from 'uuid'
import { readProblem } from '~/composables/formProblem'
import type { KeptPhotos } from '~/composables/report/keptPhotos'
import { MAX_PHOTOS_PER_REPORT, photoPath } from '~/shared/types/photo'
import type { DraftPhoto } from '~/shared/types/reportDraft'
import { useReportDraft } from '~/stores/reportDraft'

/** Needed once there is a picture: they come after the page, with the later questions. */
const atWork = {
  keeping: () => import('~/composables/report/keptPhotos'),
  reading: () => import('~/composables/report/readablePhoto'),
  sending: () => import('~/composables/report/uploadPhoto'),
}
export const fetchPhotoWork = () => Promise.allSettled(Object.values(atWork).map(load => load()))

const LOST = 'This picture is no longer on this phone. Please add it again.'
/** Statuses that say something about the picture itself; all others may pass. */
const ABOUT_THE_PICTURE = [400, 413, 415, 422]

function database(): IDBFactory | undefined {
  // Browsers that forbid storage throw as soon as it is named.
  try { return import.meta.client ? window.indexedDB : undefined }
  catch { return undefined }
}

/** The photos of one draft: kept on this phone, sent as soon as there is a signal. */
export function useReportPhotos(unitId: string, draftId: () => string) {
  const store = useReportDraft()
  let opened: Promise<KeptPhotos> | undefined
  const kept = () => opened ??= atWork.keeping().then(({ keepPhotos }) => keepPhotos(database()))
  const shares = reactive<Record<string, number>>({})
  const previews = reactive<Record<string, string>>({})
  let line: Promise<unknown> = Promise.resolve()

  const photos = computed(() => store.drafts[draftId()]?.photos ?? [])
  const room = computed(() => MAX_PHOTOS_PER_REPORT - photos.value.length)
  const find = (localId: string) => photos.value.find(photo => photo.localId === localId)
  const mark = (localId: string, changes: Partial<DraftPhoto>) => store.changePhoto(draftId(), localId, changes)

  async function add(files: readonly File[], view: DraftPhoto['view']) {
    for (const file of files.slice(0, room.value)) {
      const localId = v4()
      const readable = await atWork.reading().then(({ readablePhoto }) => readablePhoto(file))
      const refused = readable.kind === 'refused'
      if (!refused) {
        await (await kept()).put(localId, readable.picture)
        previews[localId] = URL.createObjectURL(readable.picture)
      }
      store.change(draftId(), { photos: [...photos.value, { localId, view, name: file.name, state: refused ? 'refused' : 'kept', photoId: null, problem: refused ? readable.why : null }] })
    }
    void uploadAll()
  }

  async function remove(localId: string) {
    store.change(draftId(), { photos: photos.value.filter(photo => photo.localId !== localId) })
    await forget([localId])
  }

  async function forget(localIds: readonly string[]) {
    for (const localId of localIds) {
      if (previews[localId]?.startsWith('blob:')) URL.revokeObjectURL(previews[localId])
      Reflect.deleteProperty(previews, localId)
    }
    await (await kept()).remove(localIds)
  }

  async function upload(localId: string): Promise<boolean> {
    if (find(localId)?.state !== 'kept') return true
    const picture = await (await kept()).get(localId)
    if (!picture) {
      mark(localId, { state: 'refused', problem: LOST })
      return true
    }
    try {
      shares[localId] = 0
      const { uploadPhoto } = await atWork.sending()
      const { id } = await uploadPhoto(unitId, picture, find(localId)!.view, share => shares[localId] = share)
      if (find(localId)) mark(localId, { state: 'uploaded', photoId: id, problem: null })
      return true
    }
    catch (error) {
      const { status, message } = readProblem(error)
      const isRefused = ABOUT_THE_PICTURE.includes(status)
      if (find(localId)) mark(localId, isRefused ? { state: 'refused', problem: message } : { problem: status === 429 ? message : null })
      return isRefused
    }
    finally { Reflect.deleteProperty(shares, localId) }
  }

  /** One after the other: false as soon as one has to wait for a better moment. */
  function uploadAll(): Promise<boolean> {
    const next = line.then(async () => {
      for (const { localId } of photos.value) if (!await upload(localId)) return false
      return true
    })
    line = next
    return next
  }

  /** The server no longer knows them: all go up once more. */
  function uploadAgain() {
    store.change(draftId(), { photos: photos.value.map(photo => photo.state === 'uploaded' ? { ...photo, state: 'kept', photoId: null } : photo) })
    return uploadAll()
  }

  async function restore() {
    for (const { localId, photoId, state } of photos.value) {
      const picture = await (await kept()).get(localId)
      if (picture) previews[localId] = URL.createObjectURL(picture)
      else if (photoId) previews[localId] = photoPath(photoId, 'thumb')
      else if (state === 'kept') mark(localId, { state: 'refused', problem: LOST })
    }
    await (await kept()).sweep(store.photoIdsInUse())
    void uploadAll()
  }

  onBeforeUnmount(() => Object.values(previews).forEach(url => URL.revokeObjectURL(url)))

  return { photos, room, shares, previews, add, remove, forget, uploadAll, uploadAgain, restore }
}

export type ReportPhotos = ReturnType<typeof useReportPhotos>
