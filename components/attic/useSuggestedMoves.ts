import { onMounted, onUnmounted, ref, watch } from 'vue'
import type { LoadField, PlacedItem } from '~/shared/types/loadPlan'
import type { JudgeOptions } from '~/shared/utils/structure/judgeLoadPlan'
import { suggestingMoves, type OtherField, type SuggestedMoves } from '~/shared/utils/structure/suggestMoves'

/** The plan has to rest so long before moves are looked for; and so long at a stretch the screen may wait. */
const REST_MS = 180
const STRETCH_MS = 10

export interface PlanToMend { field: LoadField, items: readonly PlacedItem[], options: JudgeOptions, others: readonly OtherField[] }

/** Moves for a plan, looked for in the pauses between drags and in short stretches, so that nothing stutters. */
export function useSuggestedMoves(plan: () => PlanToMend | null) {
  const found = ref<SuggestedMoves | null>(null)
  const looking = ref(false)
  let rest: ReturnType<typeof setTimeout> | undefined

  function look() {
    clearTimeout(rest)
    found.value = null
    const now = plan()
    looking.value = now !== null
    if (now) rest = setTimeout(() => walk(suggestingMoves(now.field, now.items, now.options, now.others)), REST_MS)
  }
  function walk(search: ReturnType<typeof suggestingMoves>) {
    const until = performance.now() + STRETCH_MS
    do {
      const step = search.next()
      if (step.done) {
        found.value = step.value
        looking.value = false
        return
      }
    } while (performance.now() < until)
    rest = setTimeout(() => walk(search))
  }
  onMounted(() => watch(() => JSON.stringify(plan()), look, { immediate: true }))
  onUnmounted(() => clearTimeout(rest))
  return { found, looking }
}
