import { ref, type Ref } from 'vue'
import { fieldDepthFt, isArrow, isChange, moveTogether, sizeFromCorner, stepByKey } from './loadPlanGeometry'
import type { LoadPlanChange, LoadPlanCorner, LoadPlanField, LoadPlanItem } from './loadPlanTypes'

interface Drag {
  lead: LoadPlanItem
  /** As they stood when the drag began. */
  items: LoadPlanItem[]
  corner: LoadPlanCorner | null
  fromX: number
  fromY: number
  ftPerPxX: number
  ftPerPxY: number
  last: string
  gesture: string
}
/** A press that has not moved yet: letting go may still change what is chosen. */
interface Press { id: string, wasChosen: boolean, adds: boolean }

interface HandsOptions {
  sheet: Ref<HTMLElement | undefined>
  field: () => LoadPlanField
  items: () => readonly LoadPlanItem[]
  chosen: () => readonly string[]
  /** Every press adds to what is chosen, or takes away from it. */
  several: () => boolean
  editable: () => boolean
  change: (changes: LoadPlanChange[], gesture: string) => void
  select: (ids: string[]) => void
  said: (changed: LoadPlanItem[]) => void
}

let gestures = 0

/** Choosing, dragging and sizing by mouse, pen, finger and keys. Each half foot on the way is told once; one gesture is one step to undo. */
export function useLoadPlanHands(options: HandsOptions) {
  const { field, items, chosen, several, editable, change, select } = options
  const drag = ref<Drag | null>(null)
  let press: Press | null = null
  let byPointer = false

  function start(event: PointerEvent, lead: LoadPlanItem, going: readonly LoadPlanItem[], corner: LoadPlanCorner | null) {
    const box = options.sheet.value?.getBoundingClientRect()
    if (!editable() || event.button !== 0 || !box || box.width === 0 || box.height === 0) return
    const target = event.currentTarget as HTMLElement
    target.setPointerCapture?.(event.pointerId)
    drag.value = {
      lead: { ...lead }, items: going.map(item => ({ ...item })), corner, fromX: event.clientX, fromY: event.clientY, last: '',
      gesture: `drag ${++gestures}`, ftPerPxX: field().spanFt / box.width, ftPerPxY: fieldDepthFt(field()) / box.height,
    }
  }

  function grab(event: PointerEvent, item: LoadPlanItem) {
    byPointer = true
    const adds = several() || event.ctrlKey || event.metaKey || event.shiftKey
    const wasChosen = chosen().includes(item.id)
    const ids = wasChosen ? [...chosen()] : adds ? [...chosen(), item.id] : [item.id]
    if (!wasChosen) select(ids)
    press = { id: item.id, wasChosen, adds }
    start(event, item, items().filter(one => ids.includes(one.id)), null)
  }

  const grabCorner = (event: PointerEvent, item: LoadPlanItem, corner: LoadPlanCorner) => start(event, item, [item], corner)

  function follow(event: PointerEvent) {
    const going = drag.value
    if (!going) return
    const dx = (event.clientX - going.fromX) * going.ftPerPxX
    const dy = (event.clientY - going.fromY) * going.ftPerPxY
    const changes = going.corner
      ? [{ id: going.lead.id, ...sizeFromCorner(field(), going.lead, going.corner, dx, dy) }]
      : moveTogether(field(), going.items, going.lead, dx, dy)
    const now = JSON.stringify(changes)
    if (now === going.last || (going.last === '' && !isChange(going.items, changes))) return
    going.last = now
    change(changes, going.gesture)
  }

  function end() {
    const still = press !== null && !drag.value?.last
    if (press && still && press.adds && press.wasChosen) select(chosen().filter(id => id !== press?.id))
    else if (press && still && !press.adds && chosen().length > 1) select([press.id])
    drag.value = null
    press = null
    byPointer = false
  }

  /** Lets go and puts everything back. */
  function cancel(): boolean {
    const going = drag.value
    if (!going) return false
    if (going.last) change(going.items.map(({ id, xFt, yFt, lengthFt, widthFt }) => ({ id, xFt, yFt, lengthFt, widthFt })), going.gesture)
    drag.value = null
    press = null
    return true
  }

  function focus(item: LoadPlanItem) {
    if (!byPointer && !several() && !chosen().includes(item.id)) select([item.id])
  }

  /** Space or Enter: there is no pointer behind such a click. */
  function click(event: MouseEvent, item: LoadPlanItem) {
    if (event.detail !== 0) return
    const isChosen = chosen().includes(item.id)
    if (several()) select(isChosen ? chosen().filter(id => id !== item.id) : [...chosen(), item.id])
    else select([item.id])
  }

  function key(event: KeyboardEvent, item: LoadPlanItem) {
    if (event.key === 'Escape') return cancel() ? undefined : select([])
    if (!editable()) return
    if (event.key.toLowerCase() === 'a' && (event.ctrlKey || event.metaKey)) {
      event.preventDefault()
      return select(items().map(one => one.id))
    }
    if (!isArrow(event.key)) return
    event.preventDefault()
    const ids = chosen().includes(item.id) ? chosen() : [item.id]
    const changes = stepByKey(field(), items().filter(one => ids.includes(one.id)), event.key, event.shiftKey)
    if (changes.length === 0) return
    change(changes, `keys ${ids.join(' ')}`)
    options.said(changes.flatMap((one) => {
      const before = items().find(each => each.id === one.id)
      return before ? [{ ...before, ...one }] : []
    }))
  }

  return { grab, grabCorner, follow, end, focus, click, key, dragging: drag }
}
