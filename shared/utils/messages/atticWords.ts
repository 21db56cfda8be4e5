import type { Access, CeilingFinish, Condition, Deck, Framing, Grade, InsulationMaterial, NotchEdge, NotchPlace, Species } from '../../types/attic'

/** The answers of a survey as a person reads them, in the order they are offered. */
export interface Wording<T> { value: T, label: string, description?: string }

export const FRAMING_WORDS: readonly Wording<Framing>[] = [
  { value: 'rafters-and-joists', label: 'Rafters and ceiling joists', description: 'Sloping boards meet at the ridge; level boards lie on the walls. The space between is open.' },
  { value: 'trusses', label: 'Trusses', description: 'Webs of thinner wood cross the space, joined by toothed metal plates.' },
  { value: 'unknown', label: 'Not sure', description: 'Nothing may be stored until somebody can tell.' },
]

export const ACCESS_WORDS: readonly Wording<Access>[] = [
  { value: 'fixed-stairs', label: 'Fixed stairs' },
  { value: 'pull-down-ladder', label: 'Pull-down ladder' },
  { value: 'hatch', label: 'Hatch' },
  { value: 'none', label: 'No way in' },
  { value: 'unknown', label: 'Not sure' },
]

export const FINISH_WORDS: readonly Wording<CeilingFinish>[] = [
  { value: 'gypsum-half-inch', label: 'Gypsum board, ½ in' },
  { value: 'gypsum-five-eighths', label: 'Gypsum board, ⅝ in' },
  { value: 'plaster-on-lath', label: 'Plaster on lath' },
  { value: 'wood-boards', label: 'Wood boards' },
  { value: 'other', label: 'Something else' },
  { value: 'unknown', label: 'Not sure' },
]

export const INSULATION_WORDS: readonly Wording<InsulationMaterial>[] = [
  { value: 'none', label: 'None' },
  { value: 'fiberglass', label: 'Fiberglass' },
  { value: 'cellulose', label: 'Cellulose' },
  { value: 'rock-wool', label: 'Rock wool' },
  { value: 'foam-board', label: 'Foam board' },
  { value: 'other', label: 'Something else' },
  { value: 'unknown', label: 'Not sure' },
]

export const DECK_WORDS: readonly Wording<Deck>[] = [
  { value: 'none', label: 'No boards on the joists' },
  { value: 'partial', label: 'Boards on part of it' },
  { value: 'full', label: 'Boards all over' },
  { value: 'unknown', label: 'Not sure' },
]

export const CONDITION_CHOICES: readonly Wording<Condition>[] = [
  { value: 'wet', label: 'Wet or damp wood' },
  { value: 'mouldy', label: 'Mould' },
  { value: 'rotten', label: 'Rot: soft, crumbling wood' },
  { value: 'insect-damaged', label: 'Insect holes or dust' },
  { value: 'cut', label: 'A member cut away' },
  { value: 'cracked-through', label: 'A member cracked through' },
  { value: 'sagging', label: 'A joist or the ceiling sags' },
  { value: 'notched', label: 'Notches cut into joists' },
  { value: 'bored', label: 'Holes bored through joists' },
]

export const SPECIES_WORDS: readonly Wording<Species | 'unknown'>[] = [
  { value: 'unknown', label: 'Not sure' },
  { value: 'Spruce-pine-fir', label: 'Spruce-pine-fir (stamp SPF)' },
  { value: 'Douglas fir-larch', label: 'Douglas fir-larch (stamp DF or D FIR-L)' },
  { value: 'Hem-fir', label: 'Hem-fir (stamp HF)' },
  { value: 'Southern pine', label: 'Southern pine (stamp SP or SYP)' },
]

export const GRADE_WORDS: readonly Wording<Grade | 'unknown'>[] = [
  { value: 'no stamp', label: 'No stamp found' },
  { value: 'SS', label: 'Select structural' },
  { value: 'No.1', label: 'No. 1' },
  { value: 'No.2', label: 'No. 2' },
  { value: 'No.3', label: 'No. 3' },
  { value: 'unknown', label: 'Not sure' },
]

export const NOTCH_PLACE_WORDS: readonly Wording<NotchPlace>[] = [
  { value: 'end', label: 'At the end, on the wall' },
  { value: 'outer-third', label: 'In an outer third' },
  { value: 'middle-third', label: 'In the middle third' },
  { value: 'unknown', label: 'Not sure' },
]

export const NOTCH_EDGE_WORDS: readonly Wording<NotchEdge>[] = [
  { value: 'top', label: 'Top edge' },
  { value: 'bottom', label: 'Bottom edge' },
  { value: 'unknown', label: 'Not sure' },
]
