import { ref, type Ref } from 'vue'
import { fieldDepthFt, placeInside, sizeInside } from './loadPlanGeometry'
import type { LoadPlanField, LoadPlanItem } from './loadPlanTypes'

interface Drag { kind: 'move' | 'resize', item: LoadPlanItem, fromX: number, fromY: number, ftPerPxX: number, ftPerPxY: number, last: string }

interface DragOptions {
  sheet: Ref<HTMLElement | undefined>
  field: () => LoadPlanField
  editable: () => boolean
  move: (change: { id: string, xFt: number, yFt: number }) => void
  resize: (change: { id: string, lengthFt: number, widthFt: number }) => void
}

/** Dragging an item, or its corner, by mouse, pen or finger. Each half foot on the way is told once. */
export function useLoadPlanDrag({ sheet, field, editable, move, resize }: DragOptions) {
  const drag = ref<Drag | null>(null)

  function start(event: PointerEvent, item: LoadPlanItem, kind: Drag['kind']) {
    const box = sheet.value?.getBoundingClientRect()
    if (!editable() || event.button !== 0 || !box || box.width === 0 || box.height === 0) return
    const target = event.currentTarget as HTMLElement
    target.setPointerCapture?.(event.pointerId)
    drag.value = {
      kind, item: { ...item }, fromX: event.clientX, fromY: event.clientY, last: '',
      ftPerPxX: field().spanFt / box.width, ftPerPxY: fieldDepthFt(field()) / box.height,
    }
  }

  function follow(event: PointerEvent) {
    const going = drag.value
    if (!going) return
    const dx = (event.clientX - going.fromX) * going.ftPerPxX
    const dy = (event.clientY - going.fromY) * going.ftPerPxY
    const { id } = going.item
    if (going.kind === 'move') {
      const place = placeInside(field(), going.item, going.item.xFt + dx, going.item.yFt + dy)
      if (isNews(going, place.xFt, place.yFt, [going.item.xFt, going.item.yFt])) move({ id, ...place })
    }
    else {
      const size = sizeInside(field(), going.item, going.item.lengthFt + dx, going.item.widthFt + dy)
      if (isNews(going, size.lengthFt, size.widthFt, [going.item.lengthFt, going.item.widthFt])) resize({ id, ...size })
    }
  }

  function end() {
    drag.value = null
  }

  return { start, follow, end, dragging: drag }
}

function isNews(drag: Drag, a: number, b: number, atStart: [number, number]): boolean {
  const now = `${a} ${b}`
  const before = drag.last || atStart.join(' ')
  drag.last = now
  return now !== before
}
