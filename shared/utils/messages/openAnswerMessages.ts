import type { OpenAnswer, OpenAnswerCode } from '../../types/openAnswer'
import { formatLoad, type UnitSystem } from '../units'

const WORDS: Record<OpenAnswerCode, string> = {
  'framing': 'What holds the roof is not known: nothing may be stored.',
  'condition': 'Nobody has looked at the state of the wood. Damage would set the rating on hold.',
  'clear-height': 'The clear height is not measured: the code then counts no storage.',
  'opening': 'The opening is not measured: the code then counts no storage.',
  'joists': 'No joists are entered: at most 10 psf is taken.',
  'measures': 'Size, spacing, span or number is not measured: at most 10 psf is taken, and no load plan is drawn.',
  'bearing-walls': 'That both ends lie on bearing walls has not been said. A longer span carries much less.',
  'stamp': 'Wood or grade is not read from a stamp: the weakest usual pair is taken.',
  'top-edge': 'Whether the top edge is held is not known: it counts as held only under a full deck.',
  'bearing-length': 'The wood on the wall is not measured: 1½ in is taken.',
  'finish': 'The ceiling finish is not known: it is taken as heavy plaster, which may sag least.',
  'insulation': 'The insulation is not fully known: a heavy one is taken.',
  'deck': 'Whether there are boards is not known: their weight is counted, their help is not.',
}

/** What an open answer does now, and what it could be worth at best. */
export function openAnswerSentence(answer: OpenAnswer, nowPsf: number, system: UnitSystem): string {
  const words = answer.fieldName ? `${answer.fieldName}: ${WORDS[answer.code].charAt(0).toLowerCase()}${WORDS[answer.code].slice(1)}` : WORDS[answer.code]
  if (answer.atBestPsf === null) return words
  const worth = answer.atBestPsf > nowPsf + 0.05 ? `At best the rating becomes ${formatLoad(answer.atBestPsf, system)}.` : 'Alone it would not raise the rating.'
  return `${words} ${worth}`
}
