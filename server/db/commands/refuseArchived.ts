import { problem } from '../../utils/problems'

/** Nothing new goes under something archived: it would be out of sight at once. */
export function refuseArchived(row: { archivedAt: string | null }, what: 'property' | 'unit' | 'attic' | 'room') {
  if (row.archivedAt) throw problem(409, 'archived', `This ${what} is archived. Restore it first.`)
}
