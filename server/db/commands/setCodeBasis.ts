import type { Db } from '../connect'
import type { Actor } from '../queries/actor'
import type { Thing } from '../queries/things'
import type { CodeBasisEditValue } from '../../../shared/schemas/codeBasis'
import { editRow } from './editRow'
import { judgeAttic } from './judgeAttic'

/** The table of loads a property goes by; null returns to the code's own. Every attic of it is judged anew. */
export function setCodeBasis(db: Db, actor: Actor, property: Thing<'property'>, { version, codeBasis }: CodeBasisEditValue) {
  return db.transaction().execute(async (trx) => {
    const edited = await editRow<Thing<'property'>>(trx, actor, {
      table: 'property', id: property.id, version, patch: { codeBasis },
      record: { organisationId: property.organisationId, unitId: null, subjectKind: 'property', action: 'code basis changed' },
    })
    const attics = await trx.selectFrom('attic as a').innerJoin('unit as u', 'u.id', 'a.unitId').select('a.id').where('u.propertyId', '=', property.id).orderBy('u.id').orderBy('a.id').execute()
    for (const { id } of attics) await judgeAttic(trx, actor, id)
    return { version: edited.version, codeBasis: edited.codeBasis }
  })
}
