import type { ReportDraft, ReportQuestion } from '../../types/reportDraft'

type Problems = Record<string, string>

/** Ours, as the server holds them: shared/schemas/observation.ts. */
const MOST_MM = { widthMm: 300, lengthMm: 20_000, sagDropMm: 2000, stainSizeMm: 20_000 } as const
const MOST_POPS = 500
const MOST_LETTERS = 2000

type Size = keyof typeof MOST_MM

/** What keeps a person from going on, by field. The server looks at everything again. */
export function problemsOn(question: ReportQuestion, { answers }: Pick<ReportDraft, 'answers'>, today: string): Problems {
  switch (question) {
    case 'room': return answers.roomId === null ? { roomId: 'Choose the room first.' } : {}
    case 'look': return answers.kind === null ? { kind: 'Choose what is most like it.' } : {}
    case 'size': return { ...sizeProblem('widthMm', answers.widthMm), ...sizeProblem('sagDropMm', answers.sagDropMm), ...sizeProblem('stainSizeMm', answers.stainSizeMm), ...countProblem(answers.popCount) }
    case 'run': return sizeProblem('lengthMm', answers.lengthMm)
    case 'around': return answers.firstSeenOn !== null && answers.firstSeenOn > today ? { firstSeenOn: 'That day is still to come.' } : {}
    case 'send': return (answers.note?.length ?? 0) > MOST_LETTERS ? { note: `At most ${MOST_LETTERS} letters, please.` } : {}
    default: return {}
  }
}

function sizeProblem(field: Size, value: number | null): Problems {
  if (value === null) return {}
  if (!Number.isFinite(value) || value < 0) return { [field]: 'Please give a number, such as 2 or 2.5.' }
  return value > MOST_MM[field] ? { [field]: 'That is very large. Is the number right?' } : {}
}

function countProblem(value: number | null): Problems {
  if (value === null) return {}
  if (!Number.isInteger(value) || value < 0) return { popCount: 'Count whole bumps, please.' }
  return value > MOST_POPS ? { popCount: `At most ${MOST_POPS}, please.` } : {}
}

/** What is sent: refused photos stay behind, and so does a number that is none. */
export function reportBody({ answers, sameAsMarkId, photos }: Pick<ReportDraft, 'answers' | 'sameAsMarkId' | 'photos'>) {
  const sound = Object.fromEntries(Object.entries(answers).map(([field, value]) => [field, typeof value === 'number' && !Number.isFinite(value) ? null : value]))
  return {
    ...sound,
    note: answers.note?.trim() || null,
    sameAsMarkId,
    photoIds: photos.flatMap(({ photoId }) => photoId ?? []),
  }
}
