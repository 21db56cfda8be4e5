import { computed, ref } from 'vue'
import { placedItem } from '~/shared/utils/attic/judgeContents'
import { shadesOf } from './loadPlanShades'
import type { LoadPlanSpot } from './loadPlanTypes'
import { useBestPlaces } from './useBestPlaces'
import type { useFieldOnPlan } from './useFieldOnPlan'

/** What is chosen on the plan, and of a single thing where it may go. */
export function usePlanChoice({ plan, answer, member, here, placed, planItems }: ReturnType<typeof useFieldOnPlan>) {
  const selectedIds = ref<string[]>([])
  const shaded = ref(true)
  const chosen = computed(() => planItems.value.filter(item => selectedIds.value.includes(item.id)))
  const alone = computed(() => chosen.value.length === 1 ? here.value.find(item => item.id === chosen.value[0]?.id) ?? null : null)
  const judged = computed(() => plan.value?.items.find(item => item.id === alone.value?.id) ?? null)
  const joist = computed(() => judged.value?.worstJoist == null ? null : plan.value?.joists[judged.value.worstJoist] ?? null)
  const places = useBestPlaces(() => {
    const item = alone.value
    return item && answer.value ? { field: answer.value.field, member: member.value, others: placed.value.filter(other => other.id !== item.id), thing: placedItem(item) } : null
  })
  const shades = computed(() => shaded.value && alone.value && answer.value && places.value?.kind === 'places' ? shadesOf(answer.value.field, places.value.spots, alone.value) : [])
  /** The first place, unless the thing stands there already. */
  const suggestion = computed<LoadPlanSpot | null>(() => {
    const [first] = places.value?.kind === 'places' ? places.value.best : []
    const item = alone.value
    return item && first && (first.xFt !== item.xFt || first.yFt !== item.yFt) ? { xFt: first.xFt, yFt: first.yFt, lengthFt: item.lengthFt, widthFt: item.widthFt } : null
  })
  return { selectedIds, shaded, chosen, alone, judged, joist, places, shades, suggestion }
}
