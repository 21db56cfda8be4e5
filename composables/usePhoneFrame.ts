import { useState } from '#imports'

export interface PhoneFrame {
  step: number
  of: number
  /** What "Back" does: a page of ours, or a step of the page itself. */
  back: { to: string } | 'step' | null
  /** 'Saved on this phone', 'Not sent yet': nothing when there is no draft. */
  saved: string
  label: string
}

const still: PhoneFrame = { step: 0, of: 0, back: null, saved: '', label: '' }

/** What the page tells the phone frame around it. `backPresses` rises when Back is pressed on a step of the page. */
export function usePhoneFrame() {
  const frame = useState<PhoneFrame>('phone-frame', () => ({ ...still }))
  const backPresses = useState<number>('phone-frame-back', () => 0)
  return {
    frame,
    backPresses,
    setFrame: (part: Partial<PhoneFrame>) => {
      frame.value = { ...frame.value, ...part }
    },
    resetFrame: () => {
      frame.value = { ...still }
    },
  }
}
