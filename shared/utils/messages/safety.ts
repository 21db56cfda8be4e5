/** Cautions that stand whole wherever they apply. Nothing here may be shortened on a screen. */

export const ESTIMATE_CAVEAT = 'This is an estimate from what was entered. It is not an engineering assessment. Local building codes and a licensed structural engineer decide.'

export const TRUSS_CAUTION = 'No storage on trusses, unless the truss design drawings or an engineer give a figure. That figure can then be entered with the document attached. Lathkey never works out a storage capacity for trusses.'

export const HOLD_CAUTION = 'The rating is on hold. Wet, mouldy, rotten, cut, notched, cracked or sagging members may not carry what they should. No storage until the attic has been inspected.'

export const LEAVE_ROOM = 'Leave the room, keep others out, and call for help. Then have a licensed engineer or the emergency service look at it.'

export const LEAVE_ROOM_SIGNS = 'Do so for: sudden or fast-widening cracks, a sagging or bulging ceiling, cracking sounds, doors that newly stick with fresh cracks, or water dripping from a ceiling. Water near lights and wiring can give an electric shock.'

export const WATER_CAUTION = 'Switch the room off at the panel if the way there is dry. Do not touch switches or lamps that are wet. Draining a wet ceiling is work for a trade.'

export const EMERGENCY_CALL = 'If pieces fall, water comes near lights or wiring, or somebody is hurt: call your emergency number, in the United States 911.'

export const HANDS_OFF = 'Do not press, tap, prod, prop or climb. A photo from the floor with zoom is enough.'

export const NO_ATTIC_FOR_TENANTS = 'Nobody asks you to go into the attic to measure.'

export const ATTIC_WORK = 'In the attic, step on joists or decking only: a ceiling between joists does not hold a person. Set the ladder on firm ground and have somebody near. It can be hotter than 120 °F up there. Wiring may run under the insulation and nails come through the roof. Wear a mask.'

export const ASBESTOS_CAUTION = 'Old textured ceilings and joint compound may hold asbestos. Do not scrape, sand or drill before it is tested.'

export const LEAD_CAUTION = 'Paint from before 1978 may hold lead. Do not scrape, sand or drill before it is tested. Inside work over 6 square feet needs a certified firm (EPA RRP).'

export const UNLOAD_FIRST = 'Stop adding. Move the heaviest things to the bearing walls or out of the attic. Do this before anybody measures.'

export const RESPONSE_TIMES_CAVEAT = 'These times are your organisation’s own policy. Local law governs notice of entry and repair deadlines.'

export const WIDTH_CLASS_CAVEAT = 'The class comes from masonry walls and tells how easy a crack is to mend. On a ceiling it speaks of decoration only. Danger on a ceiling is sag, board or plaster letting go, and what lies above.'

export const CLUE_CAVEAT = 'A clue from the pattern, not a diagnosis.'

export const LINK_CAVEAT = 'The two happened in this order. That does not prove one caused the other, and it blames nobody.'

export const RECORD_CAVEAT = 'The record shows when something was changed afterwards. It cannot prove that what was entered is true.'

export const TREND_CAVEAT = 'No published limit in mm a year exists for ceilings. These rules are our own.'

export interface HazardCaution { code: 'asbestos' | 'lead', sentence: string }

/** US use of asbestos in these ran to the late 1970s and stock was used up later: flagged to 1985 (ours). */
const ASBESTOS_TO_YEAR = 1985
const LEAD_BEFORE_YEAR = 1978

/** Hazards to show before anybody works, by year built; an unknown year counts as old. */
export function hazardCautions(yearBuilt: number | null): HazardCaution[] {
  const hazards: HazardCaution[] = []
  if (yearBuilt === null || yearBuilt <= ASBESTOS_TO_YEAR) hazards.push({ code: 'asbestos', sentence: ASBESTOS_CAUTION })
  if (yearBuilt === null || yearBuilt < LEAD_BEFORE_YEAR) hazards.push({ code: 'lead', sentence: LEAD_CAUTION })
  return hazards
}
