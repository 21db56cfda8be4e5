import type { Db } from '../../server/db/connect'
import { addItem, editItem, removeItem } from '../../server/db/commands/changeItems'
import { signTerms } from '../../server/db/commands/signTerms'
import { readTerms } from '../../server/db/queries/storageTerms'
import { things } from '../../server/db/queries/things'
import { itemFacts } from '../../shared/utils/attic/itemFacts'
import { suggestFootprint } from '../../shared/utils/goods/footprint'
import { searchCatalogue } from '../../shared/utils/goods/itemCatalogue'
import type { Cast } from './plantPeople'
import type { DemoItem } from './scenario'
import type { Step } from './steps'

interface Plot { db: Db, cast: Cast }

const SQUARE_PILE = (count: number) => Math.max(1, Math.ceil(Math.sqrt(count)))
/** What is weighed was first noted as the catalogue says, and put on the scale some days later. */
const WEIGHED_AFTER_DAYS = 4

/** One thing's life in an attic: put up, weighed, taken out again. */
export function itemSteps({ db, cast }: Plot, atticId: string, demo: DemoItem): Step[] {
  const otis = cast.otis!
  let id = ''
  const now = async () => (await things.item(db, id))!
  const steps: Step[] = [{
    daysAgo: demo.daysAgo, run: async (on) => { id = (await addItem(db, otis, (await things.attic(db, atticId))!, itemOf(demo, on))).id },
  }]
  const { weighedLb } = demo
  if (weighedLb) steps.push({
    daysAgo: demo.daysAgo - WEIGHED_AFTER_DAYS, run: async (on) => {
      const item = await now()
      await editItem(db, otis, item, { ...itemFacts(item), lowLb: weighedLb, typicalLb: weighedLb, highLb: weighedLb, weightSource: 'weighed', happenedOn: on, version: item.version })
    },
  })
  if (demo.removedDaysAgo !== undefined) steps.push({
    daysAgo: demo.removedDaysAgo, run: async (on) => {
      const item = await now()
      await removeItem(db, otis, item, { removedOn: on, version: item.version })
    },
  })
  return steps
}

function itemOf({ find, quantity, field = 1, xFt, yFt, tenantOwns }: DemoItem, placedOn: string) {
  const row = searchCatalogue(find)[0]
  if (!row) throw new Error(`The demo asks for "${find}", which the catalogue does not know`)
  const foot = suggestFootprint(row)
  const side = SQUARE_PILE(quantity)
  const round = (feet: number) => Math.round(feet * 100) / 100
  return {
    name: row.label, catalogueKey: row.key, category: row.category, quantity, lowLb: row.lowLb, typicalLb: row.typicalLb, highLb: row.highLb, weightSource: 'catalogue' as const,
    belongsTo: tenantOwns ? 'tenant' as const : 'landlord' as const, fieldNumber: field, xFt, yFt,
    lengthFt: round(foot.lengthFt * side), widthFt: round(foot.widthFt * Math.ceil(quantity / side)), heightFt: round(foot.heightFt), notes: '', keptDespite: '', photoIds: [], placedOn,
  }
}

/** A tenant who signs the terms of the attic above them. */
export const signatureStep = ({ db, cast }: Plot, atticId: string, tenant: string, daysAgo: number): Step => ({
  daysAgo, run: async () => {
    const attic = (await things.attic(db, atticId))!
    const { terms } = await readTerms(db, cast[tenant]!, attic)
    await signTerms(db, cast[tenant]!, attic, { signedName: cast[tenant]!.name, rules: terms.rules })
  },
})
