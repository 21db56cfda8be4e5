import type { StateTone } from '../ui/stateTone'
import type { SectionContent } from './sectionTypes'

export const stateWords: Record<StateTone, string> = {
  within: 'within', near: 'near', over: 'over', dormant: 'dormant', watch: 'watch', active: 'active', unknown: 'too few readings',
}

/** A load nobody has judged is not short of readings: its attic has no survey. */
export const loadWords: Record<StateTone, string> = { ...stateWords, unknown: 'not rated' }

function list(parts: string[]): string {
  return parts.length < 2 ? parts.join('') : `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)}`
}

function counted(tones: StateTone[], order: StateTone[], words = stateWords): string {
  return list(order.flatMap((tone) => {
    const count = tones.filter(t => t === tone).length
    return count === 0 ? [] : [`${count} ${words[tone]}`]
  }))
}

/** The drawing in one sentence, for those who do not see it. */
export function sectionSentence({ rooms, loads, marks }: SectionContent): string {
  const above = loads.length === 0
    ? 'nothing on record is stored above the ceiling'
    : `${loads.length} ${loads.length === 1 ? 'load is' : 'loads are'} stored above the ceiling, ${counted(loads.map(l => l.state), ['over', 'near', 'within', 'unknown'], loadWords)}`
  const below = marks.length === 0
    ? 'no mark is being followed'
    : `${marks.length} ${marks.length === 1 ? 'mark is' : 'marks are'} being followed, ${counted(marks.map(m => m.activity), ['active', 'watch', 'dormant', 'unknown'])}`
  const where = rooms.length === 0 ? 'Section through the home' : `Section through the home, from left to right ${list(rooms.map(r => r.name))}`
  return `${where}: ${above}; ${below}.`
}

/** Which room is under this share of the length. */
export function roomAt({ rooms }: Pick<SectionContent, 'rooms'>, positionShare: number): string {
  const total = rooms.reduce((sum, room) => sum + Math.max(0, room.widthShare), 0)
  let reached = 0
  for (const room of rooms) {
    reached += Math.max(0, room.widthShare) / total
    if (positionShare <= reached + 1e-9) return room.name
  }
  return rooms.at(-1)?.name ?? ''
}
