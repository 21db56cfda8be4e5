import type { Activity } from '~/shared/types/mark'
import type { MarkTone } from '../house/sectionTypes'

/** How an activity is drawn: "too few readings" is not yet a state, so it has the dotted line of what is unknown. */
export function activityTone(activity: Activity): MarkTone {
  return activity === 'too-few-readings' ? 'unknown' : activity
}
