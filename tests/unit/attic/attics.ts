import type { AtticSurvey, JoistField } from '../../../shared/types/attic'
import type { StoredItem } from '../../../shared/types/item'
import { emptyJoistField, emptySurvey } from '../../../shared/utils/attic/emptySurvey'

/** Thirteen joists 2x10 at 16 in, 12 ft span: 16 ft across, 3,840 lb at the 20 psf of limited storage (IRC Table R301.5). */
export const field: JoistField = { ...emptyJoistField('North'), species: 'Douglas fir-larch', grade: 'No.2', size: '2x10', spacingIn: 16, spanFt: 12, joistCount: 13, topEdgeBraced: true }

export const survey = (change: Partial<AtticSurvey> = {}): AtticSurvey => ({
  ...emptySurvey('2026-11-01'), framing: 'rafters-and-joists', access: 'pull-down-ladder', openingWidthIn: 24, openingLengthIn: 54, clearHeightIn: 60, habitable: false,
  ceilingFinish: 'gypsum-half-inch', insulation: { material: 'fiberglass', depthIn: 6 }, deck: 'full', conditions: [], joistFields: [field], ...change,
})

export const item = (change: Partial<StoredItem> = {}): StoredItem => ({
  id: 'a', version: 1, fieldNumber: 1, catalogueKey: null, name: 'Invented box', category: 'boxes', quantity: 1, lowLb: 50, typicalLb: 50, highLb: 50, weightSource: 'weighed',
  belongsTo: 'landlord', xFt: 0, yFt: 4, lengthFt: 2, widthFt: 2, heightFt: 2, placedOn: '2026-11-02', removedOn: null, notes: '', keptDespite: '', ...change,
})
