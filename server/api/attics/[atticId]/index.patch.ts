import { AtticEdit } from '../../../../shared/schemas/attic'
import { editRowAlone } from '../../../db/commands/editRow'
import { apiRoute } from '../../../utils/apiRoute'

export default apiRoute({
  can: 'edit attic',
  on: { attic: 'atticId' },
  body: AtticEdit,
  handle: ({ db, actor, attic, body: { version, ...patch } }) => editRowAlone(db, actor, {
    table: 'attic', id: attic.id, version, patch,
    record: { organisationId: attic.organisationId, unitId: attic.unitId, subjectKind: 'attic', action: 'attic changed' },
  }),
})
