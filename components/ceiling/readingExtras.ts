import type { ReadingRow } from '#shared/types/markPage'
import type { MarkKind } from '#shared/types/mark'
import { formatDay } from '#shared/utils/days'
import { STAIN_STATE_WORDS } from '#shared/utils/messages/markMessages'
import { readingWords } from '#shared/utils/messages/readingMessages'
import { formatNumber, type UnitSystem } from '#shared/utils/units'

const TIP_WORDS = { 'past': 'tip past the pencil mark', 'not-past': 'tip not past the pencil mark', 'no-pencil-mark': '' } as const

/** What else was said of a reading, in the order a person would tell it. */
export function readingExtras(row: ReadingRow, kind: MarkKind, segment: number, system: UnitSystem): string {
  const size = (value: number) => readingWords(kind, value, system)
  return [
    row.firstValue !== null && row.secondValue !== null ? `read twice: ${size(row.firstValue)} and ${size(row.secondValue)}` : '',
    row.stationsMm ? `${row.stationsMm.length} places in the photo: ${row.stationsMm.map(mm => formatNumber(mm, 2)).join(', ')} mm` : '',
    row.sinceSet ? `${formatNumber(row.sinceSet.nowMm, 2)} mm now, ${formatNumber(row.sinceSet.setMm, 2)} mm when set` : '',
    row.lengthMm === null ? '' : `${formatNumber(row.lengthMm)} mm long`,
    row.tipPastMm === null ? '' : `${formatNumber(row.tipPastMm)} mm past the marks`,
    row.spanMm === null ? '' : `over ${formatNumber(row.spanMm)} mm`,
    row.tip ? TIP_WORDS[row.tip] : '',
    row.stainState ? STAIN_STATE_WORDS[row.stainState].toLowerCase() : '',
    row.wroteFirst !== null && row.wroteFirst !== row.value ? `first wrote ${size(row.wroteFirst)}` : '',
    row.askedAgainstUsual === null ? '' : `asked, since it was about ${size(row.askedAgainstUsual)} before, and confirmed`,
    row.cameraOn ? `the camera says ${formatDay(row.cameraOn)}` : '',
    row.phoneAt ? `the phone’s clock said ${formatDay(row.phoneAt.slice(0, 10))}` : '',
    row.fromMark === null ? '' : `joined from mark ${row.fromMark}`,
    row.segment < segment ? 'before the repair' : '',
    row.note,
  ].filter(Boolean).join('; ')
}
