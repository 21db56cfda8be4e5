import { roofDepthPx, roofYAt } from './sectionFrame'
import type { Box, SectionBlock, SectionFrame, SectionLabel, SectionStroke } from './sectionTypes'
import { textWidth } from './textWidth'

export const fontPx = 14
export const lineHeightPx = 18
const airPx = 3

export function overlap(a: Box, b: Box): boolean {
  return a.x < b.x + b.w && b.x < a.x + a.w && a.y < b.y + b.h && b.y < a.y + a.h
}

/** Is all of the box under the roof and between the walls? */
export function isUnderRoof(frame: SectionFrame, box: Box): boolean {
  const highest = Math.max(roofYAt(frame, box.x), roofYAt(frame, box.x + box.w)) + roofDepthPx
  return box.y >= highest && box.x >= frame.wallLeft && box.x + box.w <= frame.wallRight
}

interface Taken { blocks: readonly Box[], labels: SectionLabel[] }

function isFree(box: Box, taken: Taken): boolean {
  const airy = { x: box.x - airPx, y: box.y, w: box.w + 2 * airPx, h: box.h }
  return !taken.blocks.some(block => overlap(airy, block))
    && !taken.labels.some(label => overlap(airy, label) || (label.leader !== undefined && overlap(airy, leaderBox(label.leader))))
}

function leaderBox(leader: NonNullable<SectionLabel['leader']>): Box {
  return { x: leader.x - 1, y: leader.toY, w: 2, h: leader.fromY - leader.toY }
}

/** Side steps to try: straight above first, then ever further, first towards the ridge. */
function sideSteps(labelPx: number, towardsRidge: number): number[] {
  return [0, 0.2, -0.2, 0.38, -0.38].map(share => share * labelPx * towardsRidge)
}

/** A place over its block, under the roof, touching nothing; undefined when there is none. */
export function labelOverBlock(frame: SectionFrame, block: SectionBlock, text: string, taken: Taken): SectionLabel | undefined {
  const w = textWidth(text, fontPx)
  const middle = block.x + block.w / 2
  const others = { ...taken, blocks: taken.blocks.filter(other => other !== block) }
  for (let level = 0; level < 5; level++) {
    const y = block.y - airPx - lineHeightPx - level * (lineHeightPx + 2)
    for (const step of sideSteps(w, middle < frame.ridgeX ? 1 : -1)) {
      const box = { x: middle - w / 2 + step, y, w, h: lineHeightPx }
      const leader = level === 0 ? undefined : { x: middle, fromY: block.y, toY: y + lineHeightPx }
      if (!isUnderRoof(frame, box) || !isFree(box, others)) continue
      if (leader && taken.labels.some(label => overlap(leaderBox(leader), label))) continue
      return { ...box, text, tone: block.state, key: false, leader }
    }
  }
  return undefined
}

/** A place beside or under its stroke, clear of walls, strokes and other labels. */
export function labelByStroke(frame: SectionFrame, stroke: SectionStroke, text: string, taken: Taken, bottomY: number): SectionLabel | undefined {
  const w = textWidth(text, fontPx)
  const others = { ...taken, blocks: taken.blocks.filter(other => other !== stroke) }
  const middle = stroke.x + stroke.w / 2
  for (let row = 0; row < 3; row++) {
    const beside = frame.ceilingY + 10 + row * (lineHeightPx + 1)
    const places = [
      ...(beside + lineHeightPx <= stroke.y + stroke.h + 8
        ? [{ x: stroke.x + stroke.w + 4, y: beside }, { x: stroke.x - 4 - w, y: beside }]
        : []),
      { x: middle - w / 2, y: stroke.y + stroke.h + 3 + row * (lineHeightPx + 1) },
    ]
    for (const place of places) {
      const box = { ...place, w, h: lineHeightPx }
      const inside = box.x >= frame.wallLeft + 4 && box.x + box.w <= frame.wallRight - 4 && box.y + box.h <= bottomY
      if (inside && isFree(box, others)) return { ...box, text, tone: stroke.activity, key: false }
    }
  }
  return undefined
}

/** The number that stands for a label that found no place: inside its block, or under its stroke. */
export function keyLabel(target: SectionBlock | SectionStroke, key: number, fits: (box: Box) => boolean): SectionLabel | undefined {
  const text = String(key)
  const w = textWidth(text, fontPx)
  const isBlock = 'state' in target
  const y = isBlock ? target.y + (target.h - lineHeightPx) / 2 : target.y + target.h + 2
  const box = { x: target.x + target.w / 2 - w / 2, y, w, h: lineHeightPx }
  return fits(box) ? { ...box, text, tone: isBlock ? target.state : target.activity, key: true } : undefined
}
