import { sql } from 'kysely'
import type { Db } from '../server/db/connect.ts'
import type { AtticSurvey } from '../shared/types/attic.ts'

export interface HomeCounts { units: number, marksEach: number, readingsEach: number, itemsEach: number }

/** Sound rafters over one field of joists; invented. */
const survey: AtticSurvey = {
  surveyedOn: '2025-03-01', framing: 'rafters-and-joists', access: 'pull-down-ladder', openingWidthIn: 24, openingLengthIn: 54, clearHeightIn: 60, habitable: false,
  ceilingFinish: 'gypsum-half-inch', insulation: { material: 'fiberglass', depthIn: 3 }, deck: 'full', conditions: [],
  joistFields: [{
    name: 'Main', species: 'Douglas fir-larch', grade: 'No.2', size: '2x8', breadthIn: null, depthIn: null, spacingIn: 16, spanFt: 12, joistCount: 16,
    bearingLengthIn: 3.5, topEdgeBraced: true, installedBeforeJune2013: null, preJune2013StampProven: false, notches: [], holes: [], strongbacks: [],
  }],
}

const id = (kind: string, n: string) => sql.raw(`md5('${kind} ' || ${n})::uuid`)

export const ORGANISATION = sql<string>`md5('organisation 1')::uuid`

async function fillPeople(db: Db, { units }: HomeCounts) {
  await sql`insert into organisation (id, name, time_zone, created_at) values (${ORGANISATION}, 'Invented Many Homes', 'UTC', now())`.execute(db)
  await sql`insert into app_user (id, email, name, password_hash, created_at)
    select ${id('person', 'n')}, 'person' || n || '@many.example', 'Invented ' || n, 'none', now() from generate_series(0, ${sql.lit(units)}) n`.execute(db)
  await sql`insert into membership (id, organisation_id, user_id, role, created_at)
    select ${id('membership', 'n')}, ${ORGANISATION}, ${id('person', 'n')}, case n when 0 then 'owner' else 'tenant' end, now() from generate_series(0, ${sql.lit(units)}) n`.execute(db)
}

async function fillHomes(db: Db, { units }: HomeCounts) {
  const each = sql.raw(`generate_series(1, ${units}) n`)
  await sql`insert into property (id, organisation_id, name, year_built, created_at)
    select ${id('property', 'n')}, ${ORGANISATION}, 'House ' || n, 1950 + n % 60, now() from generate_series(0, ${sql.lit(Math.ceil(units / 5))}) n`.execute(db)
  await sql`insert into unit (id, organisation_id, property_id, name, created_at) select ${id('unit', 'n')}, ${ORGANISATION}, ${id('property', '(n / 5)')}, 'Flat ' || n, now() from ${each}`.execute(db)
  await sql`insert into room (id, organisation_id, unit_id, name, length_ft, width_ft, created_at) select ${id('room', 'n')}, ${ORGANISATION}, ${id('unit', 'n')}, 'Bedroom', 14, 12, now() from ${each}`.execute(db)
  await sql`insert into tenancy (id, organisation_id, unit_id, tenant_name, starts_on, created_at) select ${id('tenancy', 'n')}, ${ORGANISATION}, ${id('unit', 'n')}, 'Invented', current_date - 900, now() from ${each}`.execute(db)
  await sql`insert into tenancy_person (tenancy_id, organisation_id, user_id) select ${id('tenancy', 'n')}, ${ORGANISATION}, ${id('person', 'n')} from ${each}`.execute(db)
}

async function fillAttics(db: Db, { units, itemsEach }: HomeCounts) {
  const each = sql.raw(`generate_series(1, ${units}) n`)
  await sql`insert into attic (id, organisation_id, unit_id, name, inventory_confirmed_on, created_at) select ${id('attic', 'n')}, ${ORGANISATION}, ${id('unit', 'n')}, 'Loft', current_date - n % 500, now() from ${each}`.execute(db)
  await sql`insert into attic_survey (id, organisation_id, unit_id, attic_id, surveyed_on, answers, rated_psf, on_hold, basis, surveyed_by, created_at)
    select ${id('survey', 'n')}, ${ORGANISATION}, ${id('unit', 'n')}, ${id('attic', 'n')}, current_date - n % 400, ${JSON.stringify(survey)}::jsonb, 20, false, 'class', ${id('person', '0')}, now() from ${each}`.execute(db)
  const every = sql.raw(`generate_series(1, ${units}) n cross join generate_series(1, ${itemsEach}) k`)
  await sql`insert into attic_item (id, organisation_id, unit_id, attic_id, name, category, quantity, low_lb, typical_lb, high_lb, weight_source, x_ft, y_ft, length_ft, width_ft, placed_on, created_at)
    select ${id('item', `n || ' ' || k`)}, ${ORGANISATION}, ${id('unit', 'n')}, ${id('attic', 'n')}, 'Boxes ' || k, 'other', 1 + k % 3, 15, 25 + n % 40, 90, 'estimate', (k * 1.3)::numeric % 9, (k * 2.1)::numeric % 17, 2, 2, current_date - 300, now() from ${every}`.execute(db)
  await sql`insert into load_event (id, organisation_id, unit_id, attic_id, item_id, kind, happened_on, delta_lb, total_after_lb, detail, recorded_by, recorded_at)
    select ${id('event', `n || ' ' || k`)}, ${ORGANISATION}, ${id('unit', 'n')}, ${id('attic', 'n')}, ${id('item', `n || ' ' || k`)}, 'in', current_date - 300, (1 + k % 3) * (25 + n % 40), 0, '{}', ${id('person', '0')}, now() from ${every}`.execute(db)
}

/** Cracks read once a month, read by gauge card: one in ten grows 3 mm a year, the others move with the season. */
async function fillMarks(db: Db, { units, marksEach, readingsEach }: HomeCounts) {
  const every = sql.raw(`generate_series(1, ${units}) n cross join generate_series(1, ${marksEach}) k`)
  await sql`insert into mark (id, organisation_id, unit_id, room_id, attic_id, number, kind, label, pin_x, pin_y, first_seen_on, created_by, created_at)
    select ${id('mark', `n || ' ' || k`)}, ${ORGANISATION}, ${id('unit', 'n')}, ${id('room', 'n')}, ${id('attic', 'n')}, n * ${sql.lit(marksEach)} + k, 'crack', 'Crack ' || k, 0.5, 0.5, current_date - 900, ${id('person', 'n')}, now() - interval '900 days' from ${every}`.execute(db)
  await sql`insert into observation (id, organisation_id, unit_id, room_id, mark_id, number, answers, danger_signs, reported_by, client_key, received_at)
    select ${id('report', `n || ' ' || k`)}, ${ORGANISATION}, ${id('unit', 'n')}, ${id('room', 'n')}, ${id('mark', `n || ' ' || k`)}, 1000000 + n * ${sql.lit(marksEach)} + k, '{"wallType":"interior","dangerSigns":[]}', '{}', ${id('person', 'n')}, ${id('key', `n || ' ' || k`)}, now() - interval '900 days' from ${every}`.execute(db)
  await sql`insert into reading (id, organisation_id, unit_id, mark_id, segment, taken_on, value, quantity, sigma, method, detail, taken_by, client_key, received_at)
    select ${id('reading', `n || ' ' || k || ' ' || i`)}, ${ORGANISATION}, ${id('unit', 'n')}, ${id('mark', `n || ' ' || k`)}, 1, current_date - (${sql.lit(readingsEach)} - i) * 30,
      2 + case when (n * ${sql.lit(marksEach)} + k) % 10 = 0 then i * 0.25 else 0 end + 0.4 * sin(i * 0.516 + n) + abs(hashtext(n || ' ' || k || ' ' || i) % 1000) / 2500.0,
      'width_mm', 0.2, 'gauge-card', '{}', ${id('person', 'n')}, ${id('reading key', `n || ' ' || k || ' ' || i`)}, now() - (${sql.lit(readingsEach)} - i) * interval '30 days'
    from ${every} cross join generate_series(1, ${sql.lit(readingsEach)}) i`.execute(db)
}

/** The same invented homes every time, only the days moving with today. */
export async function fillHomesForReview(db: Db, counts: HomeCounts): Promise<string> {
  await fillPeople(db, counts)
  await fillHomes(db, counts)
  await fillAttics(db, counts)
  await fillMarks(db, counts)
  await sql`analyze`.execute(db)
  const { rows } = await sql<{ id: string }>`select ${ORGANISATION} as id`.execute(db)
  return rows[0]!.id
}
