import type { JoistField } from '../../types/attic'
import { fieldWidthFt } from './checkLoadPlan'

/** A field seen from above, in feet from the attic's left and front walls. */
export interface FieldRectangle { leftFt: number, frontFt: number, rightFt: number, backFt: number }

type MeasuredField = Pick<JoistField, 'spanFt' | 'spacingIn' | 'joistCount' | 'layout'>

/** Room for measuring with a tape: an overlap narrower than this is no overlap. Ours. */
const TAPE_FT = 1 / 12

/** Null where the field is not measured, or nobody has said where it lies. */
export function fieldRectangle({ spanFt, spacingIn, joistCount, layout }: MeasuredField): FieldRectangle | null {
  if (!layout || !spanFt || !spacingIn || !joistCount) return null
  const widthFt = fieldWidthFt({ spacingIn, joistCount })
  const [acrossFt, deepFt] = layout.joistsRun === 'left-right' ? [spanFt, widthFt] : [widthFt, spanFt]
  return { leftFt: layout.leftFt, frontFt: layout.frontFt, rightFt: layout.leftFt + acrossFt, backFt: layout.frontFt + deepFt }
}

const overlapFt = (fromA: number, toA: number, fromB: number, toB: number): number => Math.min(toA, toB) - Math.max(fromA, fromB)

/** Fields that lie over an earlier one, by their place in the list. Fields of one attic may touch, never overlap. */
export function overlappingFields(fields: readonly (MeasuredField & Pick<JoistField, 'name'>)[]): { index: number, otherIndex: number, otherName: string }[] {
  const rectangles = fields.map(fieldRectangle)
  return rectangles.flatMap((one, index) => rectangles.slice(0, index).flatMap((other, otherIndex) => {
    if (!one || !other) return []
    const overlaps = overlapFt(one.leftFt, one.rightFt, other.leftFt, other.rightFt) > TAPE_FT && overlapFt(one.frontFt, one.backFt, other.frontFt, other.backFt) > TAPE_FT
    return overlaps ? [{ index, otherIndex, otherName: fields[otherIndex]?.name ?? '' }] : []
  }))
}
