import type { MarkKind } from '../../types/mark'
import type { ReportQuestion } from '../../types/reportDraft'

export interface QuestionWords { heading: string, lead?: string }

const SIZES: Record<MarkKind, QuestionWords> = {
  'crack': { heading: 'How wide is it at its widest?', lead: 'Compare from the floor. Hold a card or a coin to it only where you reach it with both feet on the floor.' },
  'nail-pops': { heading: 'How many bumps can you count?' },
  'sag': { heading: 'How far does it hang down?', lead: 'Judge it by eye from the floor.' },
  'stain': { heading: 'How large is the stain?', lead: 'Judge it by eye, across its longest side.' },
}

const WORDS: Record<Exclude<ReportQuestion, 'size'>, QuestionWords> = {
  room: { heading: 'Which room is it in?' },
  look: { heading: 'What does it look like?' },
  shape: { heading: 'Which is most like it?' },
  where: { heading: 'Where on the ceiling is it?' },
  run: { heading: 'How long is it, and which way does it run?', lead: 'A guess is good enough. An adult’s step is about 2½ ft.' },
  wet: { heading: 'Is it wet?', lead: 'Only look. Do not touch it.' },
  danger: { heading: 'Is any of this happening?', lead: 'These decide how fast somebody comes.' },
  changed: { heading: 'Have doors or sounds changed?' },
  around: { heading: 'Did anything happen lately?' },
  photos: { heading: 'Can you take two photos?', lead: 'One of the whole ceiling from the doorway, one close. Stay on the floor and use zoom.' },
  send: { heading: 'Look it over and send' },
}

/** Nobody is sent back under a dangerous ceiling for a photo. */
const PHOTOS_IN_DANGER: QuestionWords = { heading: 'Have you taken photos already?', lead: 'Only those you have on this phone.' }

export function questionWords(question: ReportQuestion, kind: MarkKind | null, isDanger: boolean): QuestionWords {
  if (question === 'photos' && isDanger) return PHOTOS_IN_DANGER
  return question === 'size' ? SIZES[kind ?? 'crack'] : WORDS[question]
}
