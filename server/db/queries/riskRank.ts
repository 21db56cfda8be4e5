import { sql } from 'kysely'
import { RISK_ORDER } from '../../../shared/utils/upkeep/riskOrder'

/** Place of a finding's rule in the order of risk, for `order by`; `column` is trusted text of our own, such as 'f.rule'. */
export const riskRank = (column: 'rule' | 'f.rule') => sql<number>`array_position(${sql.lit(`{${RISK_ORDER.join(',')}}`)}::text[], ${sql.ref(column)})`
