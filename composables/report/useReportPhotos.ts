import { v4 } from 'uuid'
import type { KeptPhotos } from '~/composables/report/keptPhotos'
import { formPhotoLine, LOST_PHOTO } from '~/composables/report/photoLine'
import { MAX_PHOTOS_PER_REPORT, photoPath } from '~/shared/types/photo'
import type { DraftPhoto } from '~/shared/types/reportDraft'
import { useReportDraft } from '~/stores/reportDraft'

/** Needed once there is a picture: these come after the page, with the later questions. */
const keeping = () => import('~/composables/report/keptPhotos')
const reading = () => import('~/composables/report/readablePhoto')
export const fetchPhotoWork = () => Promise.allSettled([keeping(), reading(), import('~/composables/report/uploadPhoto')])

function database(): IDBFactory | undefined {
  // Browsers that forbid storage throw as soon as it is named.
  try { return window.indexedDB }
  catch { return undefined }
}

/** The photos of one draft: kept on this phone, sent as soon as there is a signal. */
export function useReportPhotos(unitId: string, draftId: () => string) {
  const store = useReportDraft()
  const shares = reactive<Record<string, number>>({})
  const previews = reactive<Record<string, string>>({})
  const photos = computed(() => store.drafts[draftId()]?.photos ?? [])
  const room = computed(() => MAX_PHOTOS_PER_REPORT - photos.value.length)
  const mark = (localId: string, changes: Partial<DraftPhoto>) => store.changePhoto(draftId(), localId, changes)
  let opened: Promise<KeptPhotos> | undefined
  const kept = () => opened ??= keeping().then(({ keepPhotos }) => keepPhotos(database()))
  const uploadAll = formPhotoLine({
    unitId, kept, photos: () => photos.value, mark,
    onShare: (localId, share) => share === null ? Reflect.deleteProperty(shares, localId) : shares[localId] = share,
  })

  async function add(files: readonly File[], view: DraftPhoto['view']) {
    const { readablePhoto } = await reading()
    for (const file of files.slice(0, room.value)) {
      const photo: DraftPhoto = { localId: v4(), view, name: file.name, state: 'kept', photoId: null, problem: null }
      const readable = await readablePhoto(file)
      if (readable.kind === 'refused') Object.assign(photo, { state: 'refused', problem: readable.why })
      else {
        await (await kept()).put(photo.localId, readable.picture)
        previews[photo.localId] = URL.createObjectURL(readable.picture)
      }
      store.change(draftId(), { photos: [...photos.value, photo] })
    }
    void uploadAll()
  }

  async function forget(localIds: readonly string[]) {
    for (const localId of localIds) {
      if (previews[localId]?.startsWith('blob:')) URL.revokeObjectURL(previews[localId])
      Reflect.deleteProperty(previews, localId)
    }
    await (await kept()).remove(localIds)
  }

  async function remove(localId: string) {
    store.change(draftId(), { photos: photos.value.filter(photo => photo.localId !== localId) })
    await forget([localId])
  }

  /** The server no longer knows them: all go up once more. */
  function uploadAgain() {
    store.change(draftId(), { photos: photos.value.map(photo => photo.state === 'uploaded' ? { ...photo, state: 'kept', photoId: null } : photo) })
    return uploadAll()
  }

  async function restore() {
    const phone = await kept()
    for (const { localId, photoId, state } of photos.value) {
      const picture = await phone.get(localId)
      if (picture) previews[localId] = URL.createObjectURL(picture)
      else if (photoId) previews[localId] = photoPath(photoId, 'thumb')
      else if (state === 'kept') mark(localId, { state: 'refused', problem: LOST_PHOTO })
    }
    await phone.sweep(store.photoIdsInUse())
    void uploadAll()
  }

  onBeforeUnmount(() => Object.values(previews).forEach(url => URL.revokeObjectURL(url)))
  return { photos, room, shares, previews, add, remove, forget, uploadAll, uploadAgain, restore }
}

export type ReportPhotos = ReturnType<typeof useReportPhotos>
