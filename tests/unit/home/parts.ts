import type { AtticOfUnit, MarkOfUnit, RoomFacts, SectionParts } from '../../../shared/types/home'
import type { NamedContentsItem } from '../../../shared/types/item'
import type { AtticSurvey } from '../../../shared/types/attic'

export const room = (id: string, changes: Partial<RoomFacts> = {}): RoomFacts => ({
  id, name: id, isBedroom: false, lengthFt: 12, widthFt: 10, ceilingHeightIn: 96, ceilingFinish: 'unknown', sort: 0, version: 1, ...changes,
})

export const item = (id: string, changes: Partial<NamedContentsItem> = {}): NamedContentsItem => ({
  id, name: id, quantity: 1, lowLb: 40, typicalLb: 50, highLb: 60, weightSource: 'estimate', fieldNumber: 1, xFt: 0, yFt: 0, lengthFt: 2, widthFt: 2, ...changes,
})

export const attic = (changes: Partial<AtticOfUnit> = {}): AtticOfUnit => ({
  id: 'attic', name: 'Loft', notes: '', inventoryConfirmedOn: null, surveyedOn: '2026-01-01', ratedPsf: 20, onHold: false, basis: 'joists', loadState: 'within', utilisation: 0.4,
  storedLb: 0, fields: [{ spanFt: 12, spacingIn: 24, joistCount: 11 }], items: [], ...changes,
})

export const mark = (id: string, changes: Partial<MarkOfUnit> = {}): MarkOfUnit => ({
  id, number: 1, kind: 'crack', label: 'Crack', roomId: 'bed', pinX: 0.5, pinY: 0.5, activity: 'watch', state: 'open', lastValue: 1.2, lastReadOn: '2026-10-01',
  slopePerYear: 0.8, nextReadingOn: '2026-12-01', widthClass: 2, stainState: null, ...changes,
})

export const parts = (changes: Partial<SectionParts> = {}): SectionParts => ({ rooms: [room('bed'), room('hall')], attics: [attic()], marks: [], ...changes })

export const survey = (changes: Partial<AtticSurvey> = {}): AtticSurvey => ({
  surveyedOn: '2026-01-01', framing: 'rafters-and-joists', access: 'pull-down-ladder', openingWidthIn: 24, openingLengthIn: 54, clearHeightIn: 60, habitable: false,
  ceilingFinish: 'gypsum-half-inch', insulation: { material: 'fiberglass', depthIn: 3 }, deck: 'full', conditions: [],
  joistFields: [{
    name: 'Main', species: 'Douglas fir-larch', grade: 'No.2', size: '2x8', breadthIn: null, depthIn: null, spacingIn: 24, spanFt: 12, joistCount: 11, bearingLengthIn: 3.5,
    topEdgeBraced: true, installedBeforeJune2013: null, preJune2013StampProven: false, notches: [], holes: [], strongbacks: [],
  }], ...changes,
})
