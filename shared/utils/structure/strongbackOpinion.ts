import type { AtticDocument } from '../../types/attic'

export type StrongbackOpinion
  = | { kind: 'none' }
    /** `letter` names who wrote it and when. */
    | { kind: 'accepted', writtenOn: string, writtenBy: string }
    | { kind: 'does-not-count', writtenOn: string, writtenBy: string, why: 'not-attached' | 'covers-part' | 'before-survey' }

/**
 * Whether an engineer's letter lets sharing by strongbacks count: attached, for the whole attic, and written on or after
 * the survey that describes them, since the writer cannot have seen what was entered later.
 */
export function strongbackOpinion(documents: readonly AtticDocument[], surveyedOn: string): StrongbackOpinion {
  const letters = documents.filter(({ kind, acceptsStrongbacks }) => kind === 'engineer-letter' && acceptsStrongbacks === true)
  const whyNot = ({ attached, coversWholeAttic, writtenOn }: AtticDocument) =>
    !attached ? 'not-attached' as const : !coversWholeAttic ? 'covers-part' as const : writtenOn < surveyedOn ? 'before-survey' as const : null
  const newestFirst = [...letters].sort((a, b) => b.writtenOn.localeCompare(a.writtenOn))
  const counting = newestFirst.find(letter => whyNot(letter) === null)
  if (counting) return { kind: 'accepted', writtenOn: counting.writtenOn, writtenBy: counting.writtenBy }
  const [newest] = newestFirst
  const why = newest && whyNot(newest)
  return newest && why ? { kind: 'does-not-count', writtenOn: newest.writtenOn, writtenBy: newest.writtenBy, why } : { kind: 'none' }
}
