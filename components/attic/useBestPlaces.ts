import { computed } from 'vue'
import type { JoistMember, LoadField, PlacedItem } from '~/shared/types/loadPlan'
import { whereMayItGo, type NewItem, type Places } from '~/shared/utils/structure/whereMayItGo'

/** Where a thing may go, worked out anew only when the others, the joists or its own size and weight change: not while it is dragged. */
export function useBestPlaces(asked: () => { field: LoadField, member: JoistMember | undefined, others: readonly PlacedItem[], thing: NewItem } | null) {
  let lastAsked = ''
  let last: Places | null = null
  return computed(() => {
    const now = asked()
    if (!now) return null
    const { field, member, others, thing: { lengthFt, widthFt, weightLb } } = now
    const question = JSON.stringify([field, member, others, lengthFt, widthFt, weightLb])
    if (question !== lastAsked) {
      last = whereMayItGo(field, [...others], { lengthFt, widthFt, weightLb }, { member })
      lastAsked = question
    }
    return last
  })
}
