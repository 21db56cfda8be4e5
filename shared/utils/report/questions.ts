import { CRACK_SHAPES, NOTHING_ASKED, type CrackShape, type MarkKind } from '../../types/mark'
import { REPORT_QUESTIONS, type ReportAnswers, type ReportLook, type ReportQuestion } from '../../types/reportDraft'

const ONLY_FOR: Partial<Record<ReportQuestion, readonly MarkKind[]>> = {
  shape: ['nail-pops', 'sag', 'stain'],
  run: ['crack'],
  wet: ['sag', 'stain'],
}

/** The screens of one report, in order. Before the kind is known it is told as a crack, the commonest. */
export function questionsFor(kind: MarkKind | null): ReportQuestion[] {
  return REPORT_QUESTIONS.filter(question => ONLY_FOR[question]?.includes(kind ?? 'crack') ?? true)
}

const isQuestion = (asked: unknown): asked is ReportQuestion => (REPORT_QUESTIONS as readonly unknown[]).includes(asked)

/** The screen asked for, or the one that has to be answered before it. An address that names none is the first. */
export function reachableQuestion(asked: unknown, { roomId, kind }: Pick<ReportAnswers, 'roomId' | 'kind'>): ReportQuestion {
  if (roomId === null || !isQuestion(asked) || asked === 'room') return 'room'
  return kind !== null && questionsFor(kind).includes(asked) ? asked : 'look'
}

export function questionAfter(question: ReportQuestion, kind: MarkKind | null): ReportQuestion {
  const questions = questionsFor(kind)
  return questions[questions.indexOf(question) + 1] ?? 'send'
}

export function questionBefore(question: ReportQuestion, kind: MarkKind | null): ReportQuestion | null {
  const questions = questionsFor(kind)
  return questions[questions.indexOf(question) - 1] ?? null
}

/** Everything but the room, the kind and the sending itself may be left open. */
export const isSkippable = (question: ReportQuestion): boolean => question !== 'room' && question !== 'look' && question !== 'send'

const FIELDS: Record<ReportQuestion, readonly (keyof ReportAnswers)[]> = {
  room: ['roomId'],
  look: ['kind'],
  shape: ['shape'],
  where: ['pin', 'place', 'wallType'],
  size: ['widthComparison', 'widthMm', 'widthMethod', 'popCount', 'sagDropMm', 'stainSizeMm'],
  run: ['direction', 'lengthMm'],
  wet: ['stain'],
  danger: ['dangerSigns'],
  changed: ['doors', 'sounds'],
  around: ['changeAbove', 'recentEvents', 'firstSeenOn'],
  photos: [],
  send: ['note'],
}

/** On which screen a field is asked; the last one for what is asked nowhere. */
export function questionOfField(field: string, kind: MarkKind | null): ReportQuestion {
  if (field === 'photoIds') return 'photos'
  return questionsFor(kind).find(question => (FIELDS[question] as readonly string[]).includes(field)) ?? (field === 'shape' ? 'look' : 'send')
}

/** 'Not sure' is an answer: what was picked on this screen is taken back. */
export function unanswer(question: ReportQuestion, answers: ReportAnswers): ReportAnswers {
  if (!isSkippable(question)) return answers
  const blank: ReportAnswers = { ...NOTHING_ASKED, kind: null, roomId: null }
  return { ...answers, ...Object.fromEntries(FIELDS[question].map(field => [field, blank[field]])) }
}

export function lookOf({ kind, shape }: Pick<ReportAnswers, 'kind' | 'shape'>): ReportLook | null {
  return kind === 'crack' && isCrackShape(shape) ? shape : kind
}

const isCrackShape = (shape: unknown): shape is CrackShape => (CRACK_SHAPES as readonly unknown[]).includes(shape)

/** Kind and shape from one picture. Answers that only another kind has are taken back. */
export function chooseLook(answers: ReportAnswers, look: ReportLook): ReportAnswers {
  if (isCrackShape(look)) return { ...cleared(answers, 'crack'), kind: 'crack', shape: look }
  return { ...cleared(answers, look), kind: look, shape: answers.kind === look && !isCrackShape(answers.shape) ? answers.shape : null }
}

function cleared(answers: ReportAnswers, kind: MarkKind): ReportAnswers {
  if (answers.kind === kind) return answers
  return (['shape', 'size', 'run', 'wet'] as const).reduce((kept, question) => unanswer(question, kept), answers)
}
