import { eaveLimit, roofDepthPx, roofYAt, sectionFrame, sectionWalls } from './sectionFrame'
import { fontPx, keyLabel, labelByStroke, labelOverBlock, lineHeightPx, overlap } from './sectionLabels'
import { joinNearest, spread } from './sectionSpread'
import type { Box, LoadTone, MarkTone, SectionBlock, SectionContent, SectionDrawing, SectionFrame, SectionLabel, SectionLoad, SectionMark, SectionStroke } from './sectionTypes'
import { fitText, textWidth } from './textWidth'
import { formatNumber } from '~/shared/utils/units'

const loadRank: Record<LoadTone, number> = { within: 0, unknown: 1, near: 2, over: 3 }
const markRank: Record<MarkTone, number> = { unknown: 0, dormant: 1, watch: 2, active: 3 }
const defaultRatingShare: Record<LoadTone, number> = { within: 0.4, unknown: 0.4, near: 0.9, over: 1.2 }

const clampShare = (share: number) => (Number.isFinite(share) ? Math.min(1, Math.max(0, share)) : 0.5)

/**
 * Where everything in the section through the home is drawn, for a drawing of this width.
 * Labels are under the roof, clear of blocks, strokes, walls and each other; what finds no place goes to the legend.
 */
export function sectionLayout(content: SectionContent, widthPx: number, size: 'strip' | 'thumb'): SectionDrawing {
  const frame = sectionFrame(widthPx, size)
  const walls = sectionWalls(frame, content.rooms)
  const loads = placeLoads(frame, content.loads, size)
  const marks = placeMarks(frame, content.marks, size)
  const roomNames = size === 'strip' ? nameRooms(frame, content.rooms.map(room => room.name), walls.map(wall => wall.x)) : []
  const drawing: SectionDrawing = {
    ...frame, walls, ticks: joistTicks(frame, size), roomNames, labels: [], legend: [],
    blocks: loads.map(load => load.block), strokes: marks.map(mark => mark.stroke),
  }
  if (size === 'strip') {
    labelLoads(drawing, loads)
    labelMarks(drawing, marks)
  }
  return drawing
}

interface PlacedLoad { load: SectionLoad, block: SectionBlock }
interface PlacedMark { mark: SectionMark, stroke: SectionStroke }

function joinLoads(a: SectionLoad, b: SectionLoad): SectionLoad {
  const weightLb = a.weightLb + b.weightLb
  const count = countOf(a) + countOf(b)
  return {
    ...(loadRank[a.state] >= loadRank[b.state] ? a : b),
    id: `${a.id}+${b.id}`, label: `${count} things`, weightLb, weightText: joinedWeight(a, b, weightLb),
    positionShare: weightLb > 0 ? (a.positionShare * a.weightLb + b.positionShare * b.weightLb) / weightLb : a.positionShare,
    widthShare: (a.widthShare ?? 0.06) + (b.widthShare ?? 0.06),
  }
}

const countOf = (thing: { id: string }) => thing.id.split('+').length

/** The unit is taken from the words that came in: the drawing does not know which units a person reads. */
function joinedWeight(a: SectionLoad, b: SectionLoad, weightLb: number): string {
  const shown = /^([\d.,]+)\s*(\D+)$/.exec(a.weightText)
  if (!shown || a.weightLb <= 0) return `${a.weightText} + ${b.weightText}`
  const perLb = Number(shown[1]!.replaceAll(',', '')) / a.weightLb
  return `${formatNumber(weightLb * perLb)} ${shown[2]}`
}

function placeLoads(frame: SectionFrame, loads: readonly SectionLoad[], size: 'strip' | 'thumb'): PlacedLoad[] {
  const [minW, minH, gap, tallPx] = size === 'strip' ? [22, 18, 6, 46] : [9, 6, 3, 17]
  const from = eaveLimit(frame, minH)
  const to = frame.widthPx - from
  const max = Math.min(frame.widthPx < 500 ? 5 : 9, Math.floor((to - from + gap) / (minW + gap)))
  const joined = joinNearest(loads.map(load => ({ ...load, positionShare: clampShare(load.positionShare) })), max, load => load.positionShare, joinLoads)
  const length = frame.wallRight - frame.wallLeft
  const wanted = joined.map(load => Math.max(minW, clampShare(load.widthShare ?? 0.06) * length))
  const spare = to - from - gap * (joined.length - 1) - minW * joined.length
  const extra = wanted.reduce((sum, w) => sum + w - minW, 0)
  const scale = extra > spare ? Math.max(0, spare) / extra : 1
  const along = joined.map((load, i) => {
    const w = minW + (wanted[i]! - minW) * scale
    return { load, w, x: frame.wallLeft + load.positionShare * length - w / 2 }
  })
  return spread(along, from, to, gap).map(({ load, x, w }) => {
    const roof = Math.max(roofYAt(frame, x), roofYAt(frame, x + w)) + roofDepthPx
    const share = Math.min(1.3, Math.max(0, load.ratingShare ?? defaultRatingShare[load.state]))
    const h = Math.min(frame.joistTopY - roof, minH + share * (tallPx - minH))
    return { load, block: { id: load.id, state: load.state, x, w, h, y: frame.joistTopY - h } }
  })
}

function joinMarks(a: SectionMark, b: SectionMark): SectionMark {
  return { ...(markRank[a.activity] >= markRank[b.activity] ? a : b), id: `${a.id}+${b.id}`, label: `${countOf(a) + countOf(b)} marks`, positionShare: (a.positionShare + b.positionShare) / 2 }
}

function placeMarks(frame: SectionFrame, marks: readonly SectionMark[], size: 'strip' | 'thumb'): PlacedMark[] {
  const [w, h, gap] = size === 'strip' ? [18, 30, 6] : [8, 10, 3]
  const [from, to] = [frame.wallLeft + 6, frame.wallRight - 6]
  const max = Math.min(frame.widthPx < 500 ? 6 : 12, Math.floor((to - from + gap) / (w + gap)))
  const joined = joinNearest(marks.map(mark => ({ ...mark, positionShare: clampShare(mark.positionShare) })), max, mark => mark.positionShare, joinMarks)
  const along = joined.map(mark => ({ mark, w, x: frame.wallLeft + mark.positionShare * (frame.wallRight - frame.wallLeft) - w / 2 }))
  return spread(along, from, to, gap).map(({ mark, x }) => ({
    mark,
    stroke: { id: mark.id, kind: mark.kind, activity: mark.activity, weight: 1.5 + 0.3 * Math.min(5, mark.widthClass ?? 0), x, y: frame.ceilingY, w, h },
  }))
}

function nameRooms(frame: SectionFrame, names: string[], wallX: number[]): SectionDrawing['roomNames'] {
  return names.flatMap((name, i) => {
    const from = (i === 0 ? frame.wallLeft : wallX[i - 1]!) + 5
    const to = (i === names.length - 1 ? frame.wallRight : wallX[i]!) - 5
    const text = fitText(name, fontPx, to - from)
    if (text === '') return []
    const w = textWidth(text, fontPx)
    return [{ text, w, h: lineHeightPx, x: (from + to) / 2 - w / 2, y: frame.groundY - lineHeightPx - 5 }]
  })
}

function joistTicks(frame: SectionFrame, size: 'strip' | 'thumb'): number[] {
  const length = frame.wallRight - frame.wallLeft
  const count = Math.max(8, Math.round(length / (size === 'strip' ? 34 : 16)))
  return Array.from({ length: count - 1 }, (_, i) => frame.wallLeft + ((i + 1) * length) / count)
}

function labelLoads(drawing: SectionDrawing, loads: PlacedLoad[]) {
  const taken = { blocks: drawing.blocks, labels: drawing.labels }
  const byNeed = loads.toSorted((a, b) => loadRank[b.load.state] - loadRank[a.load.state] || b.load.weightLb - a.load.weightLb)
  const homeless: PlacedLoad[] = []
  for (const placed of byNeed) {
    const label = labelOverBlock(drawing, placed.block, `${placed.load.label} ${placed.load.weightText}`, taken)
    if (label) drawing.labels.push(label)
    else homeless.push(placed)
  }
  for (const { load, block } of homeless.toSorted((a, b) => a.block.x - b.block.x)) {
    numberIt(drawing, block, `${load.label} ${load.weightText}`, box => !drawing.labels.some(other => overlap(box, other)))
  }
}

function labelMarks(drawing: SectionDrawing, marks: PlacedMark[]) {
  const bottomY = drawing.groundY - lineHeightPx - 8
  const walls: Box[] = drawing.walls.map(wall => ({ x: wall.x - 3, y: drawing.ceilingY, w: 6, h: drawing.groundY - drawing.ceilingY }))
  const taken = { blocks: [...drawing.strokes, ...walls], labels: drawing.labels }
  const byNeed = marks.toSorted((a, b) => markRank[b.mark.activity] - markRank[a.mark.activity])
  for (const { mark, stroke } of byNeed) {
    const label = labelByStroke(drawing, stroke, mark.label, taken, bottomY)
    if (label) drawing.labels.push(label)
    else numberIt(drawing, stroke, mark.name ? `${mark.name} ${mark.label}` : mark.label, box => isClear(box, taken.blocks, drawing.labels, stroke))
  }
}

function isClear(box: Box, obstacles: readonly Box[], labels: readonly SectionLabel[], own: Box): boolean {
  return !obstacles.some(other => other !== own && overlap(box, other)) && !labels.some(other => overlap(box, other))
}

function numberIt(drawing: SectionDrawing, target: SectionBlock | SectionStroke, text: string, fits: (box: Box) => boolean) {
  const key = drawing.legend.filter(line => line.key !== null).length + 1
  const label = keyLabel(target, key, fits)
  if (label) drawing.labels.push(label)
  drawing.legend.push({ key: label ? key : null, text })
}
