import { v4 as newKey } from 'uuid'
import { useMarkChanges } from '~/composables/queries/marks'
import { useReadingPhotos } from '~/composables/useReadingPhotos'
import type { ReadingValue } from '#shared/schemas/reading'
import type { DangerSign } from '#shared/types/mark'
import type { MarkPage, ReadingAnswer } from '#shared/types/markPage'
import { cameraDayApart, phoneDayApart, sizeQuestion } from './readingQuestions'
import { firstValues, withoutLeftovers, type ReadingFormValues } from './readingValues'

/** Ours: long enough to write the rest of a number. */
const STILL_TYPING_MS = 700

/** One reading on its way: what is filled in, what has to be asked, and sending it once however often it is tried. */
export function useReadingForm(page: MarkPage) {
  const { read } = useMarkChanges(page.mark.id)
  const tray = useReadingPhotos(page.unit.id)
  const photoMessage = ref('')
  const key = newKey()

  const form = useForm<ReadingFormValues, ReadingValue, ReadingAnswer>({
    initial: firstValues(page.mark.kind, page.today, page.readings),
    schema: async () => {
      const { ReadingInput } = await import('~/shared/schemas/reading')
      const extra = () => ({ photoIds: tray.photos.value.flatMap(({ photoId }) => photoId ?? []), phoneAt: new Date().toISOString() })
      return { safeParse: input => ReadingInput.safeParse({ ...withoutLeftovers(input as ReadingFormValues), ...extra() }) }
    },
    submit: reading => read({ key, reading }),
  })
  const { values, problem } = form

  const written = ref<number | null>(null)
  let typing: ReturnType<typeof setTimeout> | undefined
  watch(() => values.value, (value) => {
    clearTimeout(typing)
    typing = setTimeout(() => written.value = value, STILL_TYPING_MS)
  })
  onBeforeUnmount(() => clearTimeout(typing))
  /** Another number is another question; the one written first is kept. */
  watch(() => [values.value, values.second, values.atLeast, values.atMost], () => values.confirmed = false)
  const asked = computed(() => values.confirmed || written.value !== values.value ? null : sizeQuestion(page.mark.kind, written.value, page.readings, page.mark.segment))
  watch(asked, (now) => {
    if (now) values.wroteFirst ??= now.value
  })
  /** What only the server could ask: of a photo's size, of two readings far apart. */
  const serverAsks = computed(() => problem.value?.code === 'ask-again' && asked.value === null)

  const cameraOn = computed(() => cameraDayApart(Object.values(tray.cameraTimes), values.takenOn))
  watch(() => values.takenOn, () => values.dayConfirmed = false)
  const phoneOn = ref<string | null>(null)
  onMounted(() => phoneOn.value = phoneDayApart(new Date(), page.today))

  const shownSigns = computed<DangerSign[]>(() => values.stain === 'dripping' ? [...values.dangerSigns, 'water-dripping'] : values.dangerSigns)
  const measured = computed(() => tray.photos.value.findLast(({ state, localId }) => state === 'uploaded' && tray.previews[localId]))
  watch(measured, (photo) => {
    if (values.photo && values.photo.photoId !== photo?.photoId) values.photo = null
  })

  async function send(): Promise<ReadingAnswer | undefined> {
    photoMessage.value = ''
    written.value = values.value
    await nextTick()
    if (asked.value || (cameraOn.value && !values.dayConfirmed)) return undefined
    if (!await tray.uploadAll()) {
      photoMessage.value = 'A photo did not get through. Try again when the signal is better, or remove the photo. What you entered is still here.'
      return undefined
    }
    return form.submit()
  }
  function meant(value: number) {
    values.value = value
    written.value = value
  }

  return { form, tray, photoMessage, asked, serverAsks, cameraOn, phoneOn, shownSigns, measured, send, meant }
}
