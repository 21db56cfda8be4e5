import { computed, onBeforeUnmount, onMounted, ref } from 'vue'
import type { PixelPoint } from '~/shared/types/readingDetail'
import { clampPoint, nudge, pointName, toFrame, toPicture, wholePhoto, zoomAbout, type PhotoView, type Size } from './photoView'
import { usePhotoPointer } from './usePhotoPointer'

const isPoint = ({ xPx, yPx }: PixelPoint) => Number.isFinite(xPx) && Number.isFinite(yPx)

/** A picture in a frame with points on it: by finger, mouse, buttons or keys. */
export function usePhotoStage() {
  const stage = ref<HTMLElement>()
  const picture = ref<Size>({ width: 0, height: 0 })
  const frame = ref<Size>({ width: 320, height: 300 })
  const view = ref<PhotoView>({ zoom: 1, xPx: 0, yPx: 0 })
  const points = ref<PixelPoint[]>([])
  const chosen = ref<number | null>(null)
  const said = ref('')

  /** Until the picture has come there is nothing to point at. */
  const ready = computed(() => picture.value.width > 0)

  const place = (event: PointerEvent) => {
    const { left, top } = stage.value!.getBoundingClientRect()
    return { x: event.clientX - left, y: event.clientY - top }
  }
  function add(point: PixelPoint) {
    if (!ready.value || !isPoint(point)) return
    points.value = [...points.value, clampPoint(point, picture.value)]
    chosen.value = points.value.length - 1
    said.value = `${pointName(chosen.value)} set.`
  }
  function moveTo(index: number, point: PixelPoint) {
    if (!isPoint(point)) return
    chosen.value = index
    points.value = points.value.map((old, i) => i === index ? clampPoint(point, picture.value) : old)
  }
  function takeBack() {
    points.value = points.value.slice(0, -1)
    chosen.value = points.value.length > 0 ? points.value.length - 1 : null
  }

  const pointer = usePhotoPointer({ view, picture: () => picture.value, frame: () => frame.value, place, points, onTap: add, onMove: moveTo })
  const lift = (event: PointerEvent) => chosen.value = pointer.up(event) ?? chosen.value

  const middle = () => ({ x: frame.value.width / 2, y: frame.value.height / 2 })
  const chosenAt = computed(() => chosen.value === null ? null : toFrame(view.value, points.value[chosen.value]!))
  const zoomBy = (times: number) => ready.value && (view.value = zoomAbout(view.value, times, chosenAt.value ?? middle(), picture.value, frame.value))
  const whole = () => ready.value && (view.value = wholePhoto(picture.value, frame.value))

  /** Whether the key meant something here. */
  function press(key: string, far = false): boolean {
    if (key === 'Enter') add(toPicture(view.value, middle()))
    else if (key === '+' || key === '-') zoomBy(key === '+' ? 1.5 : 1 / 1.5)
    else {
      const moved = chosen.value !== null && nudge(points.value[chosen.value]!, key, far)
      if (!moved) return false
      moveTo(chosen.value!, moved)
    }
    return true
  }
  const keydown = (event: KeyboardEvent) => {
    if (press(event.key, event.shiftKey)) event.preventDefault()
  }

  function fit() {
    // A frame without room (hidden, or just going away) has nothing to fit into.
    if (!stage.value?.clientWidth || !stage.value.clientHeight) return
    frame.value = { width: stage.value.clientWidth, height: stage.value.clientHeight }
    whole()
  }
  function loaded(event: Event) {
    const { naturalWidth, naturalHeight } = event.target as HTMLImageElement
    if (naturalWidth === 0 || naturalHeight === 0) return
    picture.value = { width: naturalWidth, height: naturalHeight }
    fit()
  }
  onMounted(() => {
    fit()
    window.addEventListener('resize', fit)
  })
  onBeforeUnmount(() => window.removeEventListener('resize', fit))

  return { stage, ready, picture, frame, view, points, chosen, chosenAt, said, pointer, lift, zoomBy, whole, press, keydown, loaded, takeBack }
}
