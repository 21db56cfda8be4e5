export const WIDTH_CLASSES = [0, 1, 2, 3, 4, 5] as const
export type WidthClassNumber = typeof WIDTH_CLASSES[number]

/** Upper limit of each class in mm, the limit itself included (BRE Digest 251; the last class has none). */
export const WIDTH_CLASS_LIMITS_MM = [0.1, 1, 5, 15, 25] as const

export interface WidthClass {
  class: WidthClassNumber
  /** Drawn from masonry walls, as ease of repair: on a ceiling it says nothing of danger. Shown wherever the class is shown. */
  caveat: 'decoration-only'
}

/** Width class of a crack. Throws RangeError below zero or for what is not a number. */
export function widthClass(widthMm: number): WidthClass {
  if (!(Number.isFinite(widthMm) && widthMm >= 0)) throw new RangeError(`Crack width must be zero or more: ${widthMm}`)
  const above = WIDTH_CLASS_LIMITS_MM.filter(limit => widthMm > limit).length
  return { class: WIDTH_CLASSES[above]!, caveat: 'decoration-only' }
}
