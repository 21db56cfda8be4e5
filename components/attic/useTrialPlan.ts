import { computed, onMounted, ref } from 'vue'
import type { AtticDetail } from '~/shared/types/atticDetail'
import type { NamedContentsItem } from '~/shared/types/item'
import { judgeTrial } from '~/shared/utils/attic/judgeContents'
import { usePlanDraft, type TrialMoves, type TrialSpot } from '~/stores/planDraft'

export type TrialChange = { id: string } & TrialSpot
/** Something that is not in the inventory, put on the plan to see what it would do. */
export interface TrialThing { id: string, name: string, weightLb: number, fieldNumber: number, xFt: number, yFt: number, lengthFt: number, widthFt: number }
interface Trial { moves: TrialMoves, leftOut: string[], things: TrialThing[] }

const MOST_STEPS = 100
const MEASURES = ['fieldNumber', 'xFt', 'yFt', 'lengthFt', 'widthFt'] as const

const asItem = ({ weightLb, ...thing }: TrialThing): NamedContentsItem => ({ ...thing, quantity: 1, lowLb: weightLb, typicalLb: weightLb, highLb: weightLb, weightSource: 'estimate' })

/**
 * The plan as a trial: moves kept in this browser, things left out or added for a look, every step undoable, all of it
 * judged as the server would. Nothing here reaches the server.
 */
export function useTrialPlan(detail: () => AtticDetail, editable: () => boolean) {
  const atticId = detail().attic.id
  const drafts = usePlanDraft()
  const leftOut = ref<string[]>([])
  const things = ref<TrialThing[]>([])
  const past = ref<Trial[]>([])
  const future = ref<Trial[]>([])
  let lastGesture = ''
  onMounted(drafts.load)

  const moves = computed(() => editable() ? drafts.drafts[atticId] ?? {} : {})
  const standing = computed(() => detail().items.map(item => ({ ...item, ...moves.value[item.id] })))
  const items = computed<NamedContentsItem[]>(() => [...standing.value.filter(item => !leftOut.value.includes(item.id)), ...things.value.map(asItem)])
  const contents = computed(() => judgeTrial(detail(), items.value))
  const changed = computed(() => standing.value.filter((item) => {
    const before = detail().items.find(one => one.id === item.id)
    return before !== undefined && MEASURES.some(measure => item[measure] !== before[measure])
  }))
  const isTrial = computed(() => changed.value.length > 0 || leftOut.value.length > 0 || things.value.length > 0)

  const now = (): Trial => ({ moves: moves.value, leftOut: leftOut.value, things: things.value })
  function become(trial: Trial) {
    drafts.keep(atticId, trial.moves)
    leftOut.value = trial.leftOut
    things.value = trial.things
  }
  /** Steps of one gesture are one step to undo. */
  function step(next: Partial<Trial>, gesture: string) {
    if (gesture !== lastGesture) past.value = [...past.value.slice(1 - MOST_STEPS), now()]
    lastGesture = gesture
    future.value = []
    become({ ...now(), ...next })
  }
  function travel(from: typeof past, to: typeof past) {
    const trial = from.value.at(-1)
    if (!trial) return
    to.value = [...to.value, now()]
    from.value = from.value.slice(0, -1)
    lastGesture = ''
    become(trial)
  }

  let acts = 0
  const act = () => `act ${++acts}`
  function change(changes: readonly TrialChange[], gesture = act()) {
    const moved = { ...moves.value }
    for (const { id, ...spot } of changes) if (detail().items.some(item => item.id === id)) moved[id] = { ...moved[id], ...spot }
    const placed = things.value.map(thing => ({ ...thing, ...changes.find(one => one.id === thing.id) }))
    step({ moves: moved, things: placed }, gesture)
  }
  const setAside = (id: string) => things.value.some(thing => thing.id === id)
    ? step({ things: things.value.filter(thing => thing.id !== id) }, act())
    : step({ leftOut: [...leftOut.value, id] }, act())
  const putBack = (id: string) => step({ leftOut: leftOut.value.filter(one => one !== id) }, act())
  function add(thing: Omit<TrialThing, 'id'>): string {
    const id = `trial-${Date.now().toString(36)}-${things.value.length + 1}`
    step({ things: [...things.value, { ...thing, id }] }, act())
    return id
  }
  const undoAll = () => step({ moves: {}, leftOut: [], things: [] }, act())
  /** The moves are the server's now; what was only looked at stays. */
  function saved() {
    drafts.drop(atticId)
    past.value = []
    future.value = []
    lastGesture = ''
  }

  return {
    items, contents, changed, leftOut, things, isTrial, change, setAside, putBack, add, undoAll, saved,
    undo: () => travel(past, future), redo: () => travel(future, past), canUndo: computed(() => past.value.length > 0), canRedo: computed(() => future.value.length > 0),
  }
}
