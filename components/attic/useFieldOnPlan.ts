import { computed, type Ref } from 'vue'
import type { JudgedContents } from '~/shared/types/contents'
import type { NamedContentsItem } from '~/shared/types/item'
import { placedItem } from '~/shared/utils/attic/judgeContents'
import type { PlanToMend } from './useSuggestedMoves'

/** One group of joists as the plan draws it: what stands on it and how each joist and item is judged. */
export function useFieldOnPlan(contents: Ref<JudgedContents>, items: Ref<NamedContentsItem[]>, fieldNumber: Ref<number>) {
  const current = computed(() => contents.value.fields.find(field => field.number === fieldNumber.value))
  const plan = computed(() => current.value?.plan?.kind === 'judged' ? current.value.plan : null)
  const problems = computed(() => current.value?.plan?.kind === 'refused' ? current.value.plan.problems : [])
  const answer = computed(() => current.value?.answer.kind === 'field' ? current.value.answer : null)
  const member = computed(() => answer.value && !answer.value.memberAssumed ? answer.value.member : undefined)
  const joists = computed(() => plan.value?.joists ?? Array.from({ length: answer.value?.field.joistCount ?? 0 }, () => ({ utilisation: null, state: 'unknown' as const })))
  const here = computed(() => items.value.filter(item => item.fieldNumber === fieldNumber.value))
  const placed = computed(() => here.value.map(placedItem))
  const planItems = computed(() => here.value.map(item => ({
    id: item.id, name: item.name, weightLb: item.typicalLb * item.quantity, xFt: item.xFt, yFt: item.yFt, lengthFt: item.lengthFt, widthFt: item.widthFt,
    state: plan.value?.items.find(judged => judged.id === item.id)?.state ?? 'over' as const,
  })))
  const toMend = computed((): PlanToMend | null => answer.value && plan.value && (plan.value.state === 'over' || plan.value.items.some(item => item.heavyInMiddle))
    ? { field: answer.value.field, items: placed.value, options: { member: member.value, strongbacksCount: answer.value.strongbacksCount } }
    : null)
  return { plan, problems, answer, member, joists, here, placed, planItems, toMend }
}
