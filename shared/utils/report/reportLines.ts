import type { ReportAnswers, ReportQuestion } from '../../types/reportDraft'
import { formatDay } from '../days'
import {
  CHANGE_ABOVE_WORDS, DANGER_SIGN_WORDS, DIRECTION_WORDS, DOOR_STATE_WORDS, MARK_KIND_WORDS, MARK_PLACE_WORDS, MARK_SHAPE_WORDS,
  RECENT_EVENT_WORDS, SOUND_STATE_WORDS, STAIN_STATE_WORDS, WALL_TYPE_WORDS, WIDTH_COMPARISON_WORDS,
} from '../messages/markMessages'
import { formatLength, formatWidth, mmToIn, type UnitSystem } from '../units'

export interface ReportLine { question: ReportQuestion, label: string, value: string }

const NOT_SAID = 'Not said'

/** What was answered, one line a screen, as it is shown before sending and on the receipt. */
export function reportLines(answers: ReportAnswers, roomName: string, system: UnitSystem = 'us'): ReportLine[] {
  const line = (question: ReportQuestion, label: string, parts: (string | false | null)[]): ReportLine =>
    ({ question, label, value: parts.filter(Boolean).join('. ') || NOT_SAID })
  const { kind } = answers
  const lines: (ReportLine | false)[] = [
    line('room', 'Room', [roomName]),
    line('look', 'Kind', [kind && MARK_KIND_WORDS[kind], kind === 'crack' && answers.shape && MARK_SHAPE_WORDS[answers.shape]]),
    kind !== 'crack' && line('shape', 'Shape', [answers.shape && MARK_SHAPE_WORDS[answers.shape]]),
    line('where', 'Where', [answers.place && MARK_PLACE_WORDS[answers.place], answers.wallType && WALL_TYPE_WORDS[answers.wallType], answers.pin && 'Pin set on the sketch']),
    line('size', kind === 'nail-pops' ? 'How many' : 'Size', [sizeWords(answers, system)]),
    kind === 'crack' && line('run', 'Length', [answers.lengthMm !== null && formatLength(mmToIn(answers.lengthMm) / 12, system), answers.direction !== 'not-known' && DIRECTION_WORDS[answers.direction]]),
    (kind === 'sag' || kind === 'stain') && line('wet', 'Wet or dry', [STAIN_STATE_WORDS[answers.stain]]),
    line('danger', 'Danger signs', answers.dangerSigns.length > 0 ? answers.dangerSigns.map(sign => DANGER_SIGN_WORDS[sign]) : ['None ticked']),
    line('changed', 'Doors and sounds', [answers.doors !== 'not-known' && DOOR_STATE_WORDS[answers.doors], SOUND_STATE_WORDS[answers.sounds]]),
    line('around', 'What happened', [
      answers.changeAbove !== 'not-known' && `Above: ${CHANGE_ABOVE_WORDS[answers.changeAbove].toLowerCase()}`,
      ...answers.recentEvents.map(event => RECENT_EVENT_WORDS[event]),
      answers.firstSeenOn && `First seen ${formatDay(answers.firstSeenOn)}`,
    ]),
  ]
  return lines.filter(entry => entry !== false)
}

function sizeWords(answers: ReportAnswers, system: UnitSystem): string | null {
  switch (answers.kind) {
    case 'crack': return answers.widthMm !== null ? `${formatWidth(answers.widthMm, system)} wide` : answers.widthComparison && WIDTH_COMPARISON_WORDS[answers.widthComparison]
    case 'nail-pops': return answers.popCount === null ? null : String(answers.popCount)
    case 'sag': return answers.sagDropMm === null ? null : `Hangs about ${formatWidth(answers.sagDropMm, system)}`
    case 'stain': return answers.stainSizeMm === null ? null : `About ${formatWidth(answers.stainSizeMm, system)} across`
    case null: return null
  }
}
