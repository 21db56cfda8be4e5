import { editAccount } from '../../db/commands/editAccount'
import { AccountInput } from '../../../shared/schemas/account'
import { apiRoute } from '../../utils/apiRoute'

export default apiRoute({
  can: 'use account',
  body: AccountInput,
  handle: ({ db, actor, body }) => editAccount(db, actor, body),
})
