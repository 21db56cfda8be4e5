import type { AtticOfUnit } from '../../types/home'
import type { JudgedContents } from '../../types/contents'
import { judgeContents } from '../attic/judgeContents'
import type { ItemVerdict } from './sectionOf'

/** An attic's contents judged from the survey and papers that came with the unit's page. */
export const contentsOf = ({ survey, documents, items }: AtticOfUnit): JudgedContents =>
  judgeContents({ survey: survey ?? null, documents: documents ?? [], items })

/**
 * Each stored thing as the load plan of its joists judges it; over wherever nothing may be stored.
 * A thing whose joists are not measured has no verdict of its own: the attic's stands for it.
 */
export function itemVerdicts(attics: readonly { attic: AtticOfUnit, contents: JudgedContents }[]): Map<string, ItemVerdict> {
  const verdicts = new Map<string, ItemVerdict>()
  for (const { attic, contents } of attics) {
    if (contents.state === 'hold' || contents.state === 'no-storage') {
      for (const { id } of attic.items) verdicts.set(id, { state: 'over', utilisation: null })
      continue
    }
    for (const { plan } of contents.fields) {
      if (plan?.kind === 'judged') for (const { id, state, utilisation } of plan.items) verdicts.set(id, { state, utilisation })
    }
  }
  return verdicts
}
