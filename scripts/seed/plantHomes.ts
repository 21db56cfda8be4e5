import type { Db } from '../../server/db/connect'
import { confirmInventory } from '../../server/db/commands/changeItems'
import { createProperty } from '../../server/db/commands/createProperty'
import { createTenancy } from '../../server/db/commands/createTenancy'
import { createUnit } from '../../server/db/commands/createUnit'
import { surveyAttic } from '../../server/db/commands/surveyAttic'
import { things, type Thing } from '../../server/db/queries/things'
import { nowInstant } from '../../server/utils/clock'
import { newId } from '../../server/utils/newId'
import { PropertyCreate, UnitCreate } from '../../shared/schemas/home'
import type { AtticSurvey } from '../../shared/types/attic'
import { daysBack } from './demoClock'
import type { Cast } from './plantPeople'
import { itemSteps, signatureStep } from './plantItems'
import { firstLook, type DemoAttic, type DemoProperty, type DemoUnit } from './scenario'
import { HOUSE_AGE_DAYS, type Step } from './steps'

interface Plot { db: Db, cast: Cast, today: string }
export interface PlantedUnit { unit: Thing<'unit'>, roomIds: string[], demo: DemoUnit }

/** Properties, units, rooms and tenancies as they stood before the year begins. */
export async function plantProperty({ db, cast, today }: Plot, demo: DemoProperty): Promise<PlantedUnit[]> {
  const owner = cast.maren!
  const { id } = await createProperty(db, owner, PropertyCreate.parse({ name: demo.name, addressLines: demo.addressLines, yearBuilt: demo.yearBuilt, notes: 'Invented for the demo.' }))
  const property = (await things.property(db, id))!
  const planted: PlantedUnit[] = []
  for (const unitDemo of demo.units) {
    const ceilingFinish = unitDemo.finish ?? 'gypsum-half-inch'
    const made = await createUnit(db, owner, property, UnitCreate.parse({
      name: unitDemo.name, accessNotes: 'Invented: ring first.', atticName: unitDemo.attic?.name ?? null,
      rooms: unitDemo.rooms.map(room => ({ ...room, ceilingHeightIn: 96, ceilingFinish })),
    }))
    const unit = (await things.unit(db, made.id))!
    const rooms = await db.selectFrom('room').select('id').where('unitId', '=', unit.id).orderBy('sort').execute()
    await plantTenancy({ db, cast, today }, unit, unitDemo)
    if (unitDemo.engineer) await admitEngineer({ db, cast, today }, unit, unitDemo.engineer)
    planted.push({ unit, roomIds: rooms.map(room => room.id), demo: unitDemo })
  }
  return planted
}

async function admitEngineer({ db, cast }: Plot, unit: Thing<'unit'>, engineer: string) {
  const { userId, organisationId } = cast[engineer]!
  await db.insertInto('unitAccess').values({ id: newId(), organisationId, unitId: unit.id, userId, untilOn: null, createdAt: nowInstant() }).execute()
}

async function plantTenancy({ db, cast, today }: Plot, unit: Thing<'unit'>, demo: DemoUnit) {
  if (!demo.tenantName || demo.tenantName.startsWith('Vacant')) return
  const { id } = await createTenancy(db, cast.maren!, unit, { tenantName: demo.tenantName, startsOn: daysBack(today, HOUSE_AGE_DAYS + 180), endsOn: null, notes: '' })
  const tenant = demo.tenant ? cast[demo.tenant] : undefined
  if (!tenant) return
  await db.insertInto('tenancyPerson').values({ tenancyId: id, organisationId: tenant.organisationId, userId: tenant.userId }).execute()
  tenant.unitIds.push(unit.id)
}

const SIGNED_DAYS_AGO = 75

/** Everything that happens in one attic over the year, as steps in time. */
export function atticSteps({ db, cast }: Plot, atticId: string, demo: DemoAttic, tenant: string | undefined): Step[] {
  const attic = async () => (await things.attic(db, atticId))!
  const otis = cast.otis!
  const steps: Step[] = demo.items.flatMap(item => itemSteps({ db, cast }, atticId, item))
  if (demo.survey) {
    const survey = demo.survey
    const surveyed = (daysAgo: number, told: AtticSurvey): Step => ({ daysAgo, run: async on => void await surveyAttic(db, otis, await attic(), { ...told, surveyedOn: on }) })
    steps.push(surveyed(HOUSE_AGE_DAYS - 5, demo.surveyAgainDaysAgo === undefined ? survey : firstLook(survey)))
    if (demo.surveyAgainDaysAgo !== undefined) steps.push(surveyed(demo.surveyAgainDaysAgo, survey))
  }
  if (demo.confirmedDaysAgo !== undefined) steps.push({ daysAgo: demo.confirmedDaysAgo, run: async on => void await confirmInventory(db, otis, await attic(), on) })
  if (tenant && demo.survey) steps.push(signatureStep({ db, cast }, atticId, tenant, SIGNED_DAYS_AGO))
  return steps
}
