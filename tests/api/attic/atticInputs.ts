import { emptyPdf } from './paperBytes'
import type { AtticDetail } from '../../../shared/types/atticDetail'
import type { AtticSurvey, JoistField } from '../../../shared/types/attic'
import type { AtticItemValue } from '../../../shared/schemas/atticItem'
import { emptyJoistField, emptySurvey } from '../../../shared/utils/attic/emptySurvey'
import type { CeilingHome } from '../../support/ceilingHome'

export interface Refusal { message: string, data: { code: string, fields?: Record<string, string>, theirs?: Record<string, unknown> } }

/** Thirteen 2x10 joists at 16 in, 12 ft span: 16 ft across, 3,840 lb at the 20 psf of limited storage (IRC Table R301.5). */
export const joists = (change: Partial<JoistField> = {}): JoistField => ({
  ...emptyJoistField('North side'), species: 'Douglas fir-larch', grade: 'No.2', size: '2x10', spacingIn: 16, spanFt: 12, joistCount: 13, topEdgeBraced: true, ...change,
})

export const survey = (surveyedOn: string, change: Partial<AtticSurvey> = {}): AtticSurvey => ({
  ...emptySurvey(surveyedOn), framing: 'rafters-and-joists', access: 'pull-down-ladder', openingWidthIn: 24, openingLengthIn: 54, clearHeightIn: 60, habitable: false,
  ceilingFinish: 'gypsum-half-inch', insulation: { material: 'fiberglass', depthIn: 6 }, deck: 'full', conditions: [], joistFields: [joists()], ...change,
})

export const item = (placedOn: string, change: Partial<AtticItemValue> = {}): AtticItemValue => ({
  name: 'Invented boxes', catalogueKey: null, category: 'boxes', quantity: 2, lowLb: 20, typicalLb: 30, highLb: 45, weightSource: 'estimate', belongsTo: 'tenant',
  fieldNumber: 1, xFt: 0, yFt: 4, lengthFt: 2, widthFt: 2, heightFt: 2, notes: '', keptDespite: '', photoIds: [], placedOn, ...change,
})

export const about = (writtenOn: string, change: object = {}) => ({
  kind: 'engineer-letter', writtenOn, writtenBy: 'Edda Invented, PE', ratedPsf: 15, liftsHold: false, coversWholeAttic: true, area: '', ...change,
})

export function paperForm(words: unknown, file: { bytes?: Uint8Array, name?: string, type?: string } | null = {}): FormData {
  const form = new FormData()
  if (words !== undefined) form.set('about', typeof words === 'string' ? words : JSON.stringify(words))
  if (file) form.set('file', new File([new Uint8Array(file.bytes ?? emptyPdf)], file.name ?? 'letter.pdf', { type: file.type ?? 'application/pdf' }))
  return form
}

/** Attics of one home, each test its own, with the calls of the slice. */
export async function newAttic(home: CeilingHome, name = 'Invented attic') {
  const { body: { id } } = await home.owner.post<{ id: string }>(`/api/units/${home.unitId}/attics`, { name })
  const path = `/api/attics/${id}`
  return {
    id, path,
    read: async () => (await home.owner.get<AtticDetail>(path)).body,
    survey: (change: Partial<AtticSurvey> = {}) => home.owner.post<Refusal & { surveyId: string, rating: { ratedPsf: number, hold: boolean, basis: string } }>(`${path}/surveys`, survey(home.today, change)),
    put: (change: Partial<AtticItemValue> = {}) => home.owner.post<AtticItemValue & Refusal & { id: string, version: number }>(`${path}/items`, item(home.today, change)),
    paper: (words: unknown, file?: Parameters<typeof paperForm>[1]) => home.owner.post<Refusal & { id: string }>(`${path}/documents`, paperForm(words, file)),
    rows: {
      events: () => home.db.selectFrom('loadEvent').selectAll().where('atticId', '=', id).orderBy('recordedAt').orderBy('id').execute(),
      status: () => home.db.selectFrom('atticStatus').selectAll().where('atticId', '=', id).executeTakeFirst(),
      findings: async () => (await home.db.selectFrom('finding').select('rule').where('subjectId', '=', id).where('clearedAt', 'is', null).orderBy('rule').execute()).map(row => row.rule),
      actions: async (subjectId = id) => (await home.db.selectFrom('recordEntry').select('action').where('subjectId', '=', subjectId).orderBy('seq').execute()).map(row => row.action),
    },
  }
}
