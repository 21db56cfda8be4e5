import type { Trx } from '../connect'

/** The organisation's next short number (reports, marks, jobs share one count), for people to say on the phone. */
export async function takeNumber(trx: Trx, organisationId: string): Promise<number> {
  const row = await trx.updateTable('organisation')
    .set(eb => ({ lastNumber: eb('lastNumber', '+', 1) }))
    .where('id', '=', organisationId).returning('lastNumber').executeTakeFirstOrThrow()
  return row.lastNumber
}
