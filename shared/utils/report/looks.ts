import type { ReportLook } from '../../types/reportDraft'

/** What a person picks from on "What does it look like?", on the phone and on the paper form. */
export const LOOKS: readonly { value: ReportLook, label: string, description?: string }[] = [
  { value: 'straight-line', label: 'A straight line', description: 'often along a joint' },
  { value: 'wandering-line', label: 'A line that wanders' },
  { value: 'slanting-line', label: 'A slanting line', description: 'often from a corner or a door' },
  { value: 'web-of-lines', label: 'A web of many lines', description: 'old plaster does this' },
  { value: 'gap-along-wall', label: 'A gap along the wall' },
  { value: 'crack', label: 'Some other crack' },
  { value: 'nail-pops', label: 'Round bumps', description: 'one, a row, or here and there' },
  { value: 'sag', label: 'It hangs or bulges' },
  { value: 'stain', label: 'A stain or a wet patch' },
]
