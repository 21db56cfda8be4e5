import { sql } from 'kysely'
import { CEILING_PSF } from '../../../shared/utils/structure/deadLoadValues'
import { BEDROOM_WEIGHT, USUAL_CEILING_HEIGHT_IN } from '../../../shared/utils/upkeep/fallRisk'
import { RISK_ORDER } from '../../../shared/utils/upkeep/riskOrder'

/** Place of a finding's rule in the order of risk, for `order by`; `column` is trusted text of our own, such as 'f.rule'. */
export const riskRank = (column: 'rule' | 'f.rule') => sql<number>`array_position(${sql.lit(`{${RISK_ORDER.join(',')}}`)}::text[], ${sql.ref(column)})`

const FINISH_WEIGHTS = sql.join(Object.entries(CEILING_PSF).map(([finish, { psf }]) => sql`when ${sql.lit(finish)} then ${sql.lit(psf)}`), sql` `)

/** fallRisk of shared/utils/upkeep, of the room `r`; a finish that is no known word is taken as unknown. */
export const fallRiskOfRoom = sql<number>`(case r.ceiling_finish ${FINISH_WEIGHTS} else ${sql.lit(CEILING_PSF.unknown.psf)} end
  * coalesce(r.ceiling_height_in, ${sql.lit(USUAL_CEILING_HEIGHT_IN)}) / 12 * case when r.is_bedroom then ${sql.lit(BEDROOM_WEIGHT)} else 1 end)::double precision`

/** Of findings equally grave and of one rule: what could fall on whom, for a finding's subject; what is no mark comes after. For `order by … desc`. */
export const fallRiskOfSubject = (column: 'subject_id' | 'f.subject_id') =>
  sql<number>`coalesce((select ${fallRiskOfRoom} from mark k join room r on r.id = k.room_id where k.id = ${sql.ref(column)}), 0)`
