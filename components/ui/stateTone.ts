/** How a state is drawn. Load: within, near, over. A mark: dormant, watch, active. `unknown` when we cannot tell yet. */
export type StateTone = 'within' | 'near' | 'over' | 'dormant' | 'watch' | 'active' | 'unknown'

/** Tailwind text colour of each tone; always beside a word and a shape. */
export const toneColour: Record<StateTone, string> = {
  within: 'text-slate',
  dormant: 'text-slate',
  near: 'text-ochre',
  watch: 'text-ochre',
  over: 'text-madder',
  active: 'text-madder',
  unknown: 'text-graphite',
}
