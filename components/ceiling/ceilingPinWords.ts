import type { CeilingPin } from '~/shared/types/mark'

/** Which side of the sketch is which wall; the door is at the bottom unless said otherwise. */
export interface CeilingWalls { top: string, right: string, bottom: string, left: string }

export const wallsFromTheDoor: CeilingWalls = {
  top: 'wall across from the door', right: 'wall on the right', bottom: 'wall with the door', left: 'wall on the left',
}

export const clampPin = ({ xShare, yShare }: CeilingPin): CeilingPin => ({ xShare: clamp(xShare), yShare: clamp(yShare) })

const clamp = (share: number) => Math.round(Math.min(1, Math.max(0, Number.isFinite(share) ? share : 0.5)) * 1000) / 1000

/** 'in the middle', 'near the wall with the door', 'in the corner of …': thirds of the room, which is as fine as words go. */
export function ceilingPinWords({ xShare, yShare }: CeilingPin, walls: CeilingWalls = wallsFromTheDoor): string {
  const across = xShare < 1 / 3 ? walls.left : xShare > 2 / 3 ? walls.right : null
  const along = yShare < 1 / 3 ? walls.top : yShare > 2 / 3 ? walls.bottom : null
  if (across && along) return `in the corner of the ${along} and the ${across}`
  if (across ?? along) return `near the ${across ?? along}`
  return 'in the middle of the ceiling'
}

const steps: Record<string, [number, number]> = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, -1], ArrowDown: [0, 1] }
const stepShare = 0.05

/** Where an arrow key moves the pin: a twentieth of the room a press. Null for other keys. */
export function movePinByKey(pin: CeilingPin, key: string): CeilingPin | null {
  const step = steps[key]
  return step ? clampPin({ xShare: pin.xShare + step[0] * stepShare, yShare: pin.yShare + step[1] * stepShare }) : null
}

/** Closer than this, a finger cannot tell two pins apart on a phone. */
const apartShare = 0.1

/** Pins that stand on each other are drawn beside each other; words and records keep the true place. */
export function spreadPins<T extends { pin: CeilingPin }>(marks: readonly T[]): T[] {
  const placed: T[] = []
  for (const mark of marks) {
    let pin = mark.pin
    for (let tries = 0; tries < 9 && placed.some(other => Math.hypot(other.pin.xShare - pin.xShare, other.pin.yShare - pin.yShare) < apartShare); tries++) {
      pin = { ...pin, xShare: pin.xShare + 0.13 > 0.97 ? 0.06 : pin.xShare + 0.13 }
    }
    placed.push({ ...mark, pin })
  }
  return placed
}
