import { computed, type Ref } from 'vue'
import type { JudgedContents } from '~/shared/types/contents'
import type { NamedContentsItem } from '~/shared/types/item'
import type { LoadFieldAnswer } from '~/shared/types/loadPlan'
import { placedItem } from '~/shared/utils/attic/judgeContents'
import type { JudgeOptions } from '~/shared/utils/structure/judgeLoadPlan'
import type { PlanToMend } from './useSuggestedMoves'

type FieldAnswer = LoadFieldAnswer & { kind: 'field' }
const memberOf = ({ member, memberAssumed }: FieldAnswer) => memberAssumed ? undefined : member
const optionsOf = (answer: FieldAnswer): JudgeOptions => ({ member: memberOf(answer), strongbacksCount: answer.strongbacksCount })

/** One group of joists as the plan draws it: what stands on it and how each joist and item is judged. */
export function useFieldOnPlan(contents: Ref<JudgedContents>, items: Ref<NamedContentsItem[]>, fieldNumber: Ref<number>) {
  const current = computed(() => contents.value.fields.find(field => field.number === fieldNumber.value))
  const plan = computed(() => current.value?.plan?.kind === 'judged' ? current.value.plan : null)
  const problems = computed(() => current.value?.plan?.kind === 'refused' ? current.value.plan.problems : [])
  const answer = computed(() => current.value?.answer.kind === 'field' ? current.value.answer : null)
  const member = computed(() => answer.value ? memberOf(answer.value) : undefined)
  const joists = computed(() => plan.value?.joists ?? Array.from({ length: answer.value?.field.joistCount ?? 0 }, () => ({ utilisation: null, state: 'unknown' as const })))
  const here = computed(() => items.value.filter(item => item.fieldNumber === fieldNumber.value))
  const placed = computed(() => here.value.map(placedItem))
  const planItems = computed(() => here.value.map((item) => {
    const judged = plan.value?.items.find(one => one.id === item.id)
    return { ...placedItem(item), name: item.name, state: judged?.state ?? 'over' as const, dense: judged?.heavyInMiddle ?? false }
  }))
  const others = computed(() => contents.value.fields.flatMap(({ number, answer: other }) => other.kind === 'field' && number !== fieldNumber.value
    ? [{ number, field: other.field, items: items.value.filter(item => item.fieldNumber === number).map(placedItem), options: optionsOf(other) }]
    : []))
  const toMend = computed((): PlanToMend | null => answer.value && plan.value && (plan.value.state === 'over' || plan.value.items.some(item => item.heavyInMiddle))
    ? { field: answer.value.field, items: placed.value, options: optionsOf(answer.value), others: others.value }
    : null)
  return { plan, problems, answer, member, joists, here, placed, planItems, toMend }
}
