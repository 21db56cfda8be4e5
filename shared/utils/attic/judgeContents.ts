import type { AtticDocument, AtticSurvey } from '../../types/attic'
import type { DocumentRow } from '../../types/atticDetail'
import type { AtticRating } from '../../types/atticRating'
import type { ContentState, JudgedContents, JudgedField } from '../../types/contents'
import type { ContentsItem } from '../../types/item'
import type { LoadFieldAnswer, PlacedItem } from '../../types/loadPlan'
import { chanceOfExceeding, inventoryTotal } from '../goods/inventoryTotal'
import { judgeLoadPlan } from '../structure/judgeLoadPlan'
import { loadFieldOf } from '../structure/loadField'
import { loadStateOf } from '../structure/loadState'
import { rateAttic } from '../structure/rating'
import { strongbackOpinion } from '../structure/strongbackOpinion'
import { CHANCE_LIMIT } from '../upkeep/findAtticFindings'

export interface Contents {
  survey: AtticSurvey | null
  documents: readonly AtticDocument[]
  items: readonly ContentsItem[]
}

/**
 * An attic's contents against its rating: the total with its band, the load plan of each field and one verdict. The server,
 * the attic's page and the trial plan all judge by this.
 */
export function judgeContents({ survey, documents, items }: Contents): JudgedContents {
  const rating = survey ? rateAttic(survey, [...documents]) : null
  const total = inventoryTotal(items.map(item => ({ ...item, count: item.quantity })))
  const fields = survey && rating ? judgeFields(survey, rating, documents, items) : []
  const ratedTotalLb = ratedTotalOf(rating, fields)
  const worstJoist = worstJoistOf(fields)
  const chance = ratedTotalLb === null ? null : chanceOfExceeding(total, ratedTotalLb)
  const shares = [...ratedTotalLb ? [total.typicalLb / ratedTotalLb] : [], ...worstJoist ? [worstJoist.utilisation] : []]
  const utilisation = shares.length > 0 ? Math.max(...shares) : null
  return {
    rating, itemCount: items.length, totalLb: total.typicalLb, lowLb: total.lowLb, highLb: total.highLb,
    ratedTotalLb, chanceOfExceeding: chance, utilisation, worstJoist,
    heavyInMiddle: fields.flatMap(field => field.plan?.kind === 'judged' ? field.plan.items.filter(item => item.heavyInMiddle).map(item => item.id) : []),
    outside: outsideOf(fields, items),
    fields,
    state: stateOf({ rating, items, fields, utilisation, chance }),
  }
}

/** The same from what the attic's page holds. Every paper listed there has its file. */
export const judgeTrial = ({ survey, documents }: { survey: AtticSurvey | null, documents: readonly DocumentRow[] }, items: readonly ContentsItem[]): JudgedContents =>
  judgeContents({ survey, documents: documents.map(paper => ({ ...paper, attached: true })), items })

/** Items that stand outside the measured joists, or over joists the survey does not have: they cannot be judged where they are. */
function outsideOf(fields: readonly JudgedField[], items: readonly ContentsItem[]): string[] {
  if (fields.length === 0) return []
  const refused = fields.flatMap(field => field.plan?.kind === 'refused'
    ? field.plan.problems.flatMap(({ at }) => at.part === 'item' ? [at.id] : [])
    : [])
  const strayed = items.filter(item => !fields.some(field => field.number === item.fieldNumber)).map(item => item.id)
  return [...new Set([...refused, ...strayed])]
}

/** An item as the load plan reads it: the whole pile's weight over its rectangle. */
export const placedItem = (item: Omit<ContentsItem, 'fieldNumber' | 'weightSource' | 'lowLb' | 'highLb'>): PlacedItem => ({
  id: item.id, weightLb: item.quantity * item.typicalLb, xFt: item.xFt, yFt: item.yFt, lengthFt: item.lengthFt, widthFt: item.widthFt,
})

function judgeFields(survey: AtticSurvey, rating: AtticRating, documents: readonly AtticDocument[], items: readonly ContentsItem[]): JudgedField[] {
  const letterAccepts = strongbackOpinion(documents, survey.surveyedOn).kind === 'accepted'
  return survey.joistFields.map((surveyed, index) => judgeField(loadFieldOf(survey, surveyed, rating.ratedPsf, letterAccepts), surveyed.name, index, items))
}

function judgeField(answer: LoadFieldAnswer, name: string, index: number, items: readonly ContentsItem[]): JudgedField {
  const here = items.filter(item => item.fieldNumber === index + 1).map(placedItem)
  const plan = answer.kind === 'field'
    ? judgeLoadPlan(answer.field, here, { member: answer.memberAssumed ? undefined : answer.member, strongbacksCount: answer.strongbacksCount })
    : null
  return { number: index + 1, name, answer, plan }
}

/** Only when every field is measured: a part would make the whole look smaller than it is, or larger. */
function ratedTotalOf(rating: AtticRating | null, fields: readonly JudgedField[]): number | null {
  if (!rating || rating.ratedPsf <= 0 || fields.length === 0) return null
  const totals = fields.map(field => field.plan?.kind === 'judged' ? field.plan.ratedTotalLb : null)
  return totals.every(total => total !== null) ? totals.reduce((sum, total) => sum + total, 0) : null
}

function worstJoistOf(fields: readonly JudgedField[]): JudgedContents['worstJoist'] {
  let worst: JudgedContents['worstJoist'] = null
  for (const { number, name, plan } of fields) {
    if (plan?.kind !== 'judged') continue
    const { utilisation, limit, state } = plan.joists[plan.worstJoist]!
    if (utilisation > (worst?.utilisation ?? 0)) worst = { fieldNumber: number, fieldName: name, joistNumber: plan.worstJoist + 1, utilisation, limit, state }
  }
  return worst
}

interface Standing { rating: AtticRating | null, items: readonly ContentsItem[], fields: readonly JudgedField[], utilisation: number | null, chance: number | null }

function stateOf({ rating, items, fields, utilisation, chance }: Standing): ContentState {
  if (!rating) return 'unsurveyed'
  if (rating.hold) return 'hold'
  if (rating.ratedPsf <= 0) return 'no-storage'
  if (items.length === 0) return 'empty'
  // A thing entered outside the measured field cannot be judged, and must not pass as within.
  if (outsideOf(fields, items).length > 0 || fields.some(field => field.plan?.kind === 'refused')) return 'over'
  const state = loadStateOf(utilisation ?? 0)
  const unjudged = utilisation === null || fields.some(field => field.plan === null)
  const uncertain = (chance ?? 0) > CHANCE_LIMIT || unjudged
  return state === 'within' && uncertain ? 'near' : state
}
