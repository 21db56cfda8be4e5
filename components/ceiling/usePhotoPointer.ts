import { ref, type Ref } from 'vue'
import type { PixelPoint } from '~/shared/types/readingDetail'
import { insideOf, toFrame, toPicture, zoomAbout, type PhotoView, type Size } from './photoView'

interface PointerStage {
  view: Ref<PhotoView>
  picture: () => Size
  frame: () => Size
  /** Where a pointer is, in the frame. */
  place: (event: PointerEvent) => { x: number, y: number }
  points: Ref<PixelPoint[]>
  onTap: (point: PixelPoint) => void
  onMove: (index: number, point: PixelPoint) => void
}

interface At { x: number, y: number }

/** A finger that stays within this is a tap; a point within this of it is the one that is meant. */
const TAP_PX = 8
const GRAB_PX = 24

/** One finger moves a point or the picture, or sets the next point by a tap; two fingers pinch. */
export function usePhotoPointer({ view, picture, frame, place, points, onTap, onMove }: PointerStage) {
  const fingers = new Map<number, At>()
  const held = ref<number | null>(null)
  let start: At | null = null
  let moved = false

  function down(event: PointerEvent) {
    if (picture().width === 0) return
    const at = place(event)
    fingers.set(event.pointerId, at)
    ;(event.currentTarget as Element).setPointerCapture(event.pointerId)
    if (fingers.size > 1) {
      moved = true
      held.value = null
      return
    }
    start = at
    moved = false
    held.value = nearest(at)
  }

  function nearest(at: At): number | null {
    const far = points.value.map(point => toFrame(view.value, point)).map(({ x, y }) => Math.hypot(x - at.x, y - at.y))
    const least = Math.min(...far)
    return far.length > 0 && least <= GRAB_PX ? far.indexOf(least) : null
  }

  function move(event: PointerEvent) {
    const before = fingers.get(event.pointerId)
    if (!before) return
    const at = place(event)
    const other = [...fingers].find(([id]) => id !== event.pointerId)?.[1]
    fingers.set(event.pointerId, at)
    if (other) return pinch(other, before, at)
    if (!moved && start && Math.hypot(at.x - start.x, at.y - start.y) < TAP_PX) return
    moved = true
    if (held.value !== null) onMove(held.value, toPicture(view.value, at))
    else view.value = insideOf({ ...view.value, xPx: view.value.xPx - (at.x - before.x) / view.value.zoom, yPx: view.value.yPx - (at.y - before.y) / view.value.zoom }, picture(), frame())
  }

  function pinch(still: At, before: At, at: At) {
    const apart = (one: At) => Math.hypot(one.x - still.x, one.y - still.y)
    if (apart(before) > 0) view.value = zoomAbout(view.value, apart(at) / apart(before), { x: (still.x + at.x) / 2, y: (still.y + at.y) / 2 }, picture(), frame())
  }

  function up(event: PointerEvent) {
    const at = fingers.get(event.pointerId)
    fingers.delete(event.pointerId)
    const chosen = held.value
    if (fingers.size === 0) held.value = null
    if (!at || moved || fingers.size > 0 || event.type !== 'pointerup') return null
    // The other edge of a fine crack lies closer than a finger is wide: half a pair is always completed by a tap.
    if (chosen !== null && points.value.length % 2 === 0) return chosen
    onTap(toPicture(view.value, at))
    return null
  }

  return { held, down, move, up }
}
