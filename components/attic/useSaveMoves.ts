import { useQueryClient } from '@tanstack/vue-query'
import { ref } from 'vue'
import { readProblem } from '~/composables/formProblem'
import { atticKey, useMoveItems } from '~/composables/queries/attics'
import type { StoredItem } from '~/shared/types/item'

/** The first thing wrong, by the name of what it is wrong with. */
function sentenceOf(wrong: Record<string, string>, changed: readonly StoredItem[]): string | undefined {
  const [first] = Object.entries(wrong)
  const name = changed[Number(/^moves\.(\d+)\./.exec(first?.[0] ?? '')?.[1] ?? Number.NaN)]?.name
  return first && (name ? `${name}: ${first[1]}` : first[1])
}

/** Saves what was moved on the trial plan, all or none, and says how that went. */
export function useSaveMoves(atticId: string, saved: () => void) {
  const client = useQueryClient()
  const move = useMoveItems(atticId)
  const saving = ref(false)
  const said = ref('')
  const trouble = ref('')

  async function save(happenedOn: string, changed: readonly StoredItem[]) {
    saving.value = true
    trouble.value = ''
    try {
      const moves = changed.map(({ id, version, fieldNumber, xFt, yFt, lengthFt, widthFt }) => ({ itemId: id, version, fieldNumber, xFt, yFt, lengthFt, widthFt }))
      await move({ happenedOn, moves })
      saved()
      said.value = moves.length === 1 ? 'Saved: the move is in the load history.' : 'Saved: the moves are in the load history.'
    }
    catch (error) {
      const { status, message, fields: wrong } = readProblem(error)
      trouble.value = status === 409
        ? 'Somebody else changed something here meanwhile. The plan now shows it, with your moves on top. Look at it, then save again.'
        : sentenceOf(wrong, changed) ?? message
      await client.invalidateQueries({ queryKey: atticKey(atticId) })
    }
    finally { saving.value = false }
  }
  return { saving, said, trouble, save }
}
