import type { AdviceCode, FindingSubjectKind } from '../../types/finding'
import type { DueKind } from '../upkeep/dueItems'

export interface NextStep { label: string, to: string }

type Place = { subjectKind: FindingSubjectKind | 'item' | 'observation', subjectId: string, unitId: string, findingId: string }

const attic = (id: string, part = '') => `/attics/${id}${part}`

/** The one thing that would settle a finding, as a button: its words and the page it opens. */
export function nextStep(adviceCode: AdviceCode, { subjectKind, subjectId, unitId, findingId }: Place): NextStep {
  const onAttic = subjectKind === 'attic'
  const onMark = subjectKind === 'mark'
  switch (adviceCode) {
    case 'stop-adding-and-unload': case 'stop-adding': case 'move-to-bearing-walls':
      return onAttic ? { label: 'Open the load plan', to: attic(subjectId, '/load-plan') } : { label: 'See the home', to: `/units/${unitId}` }
    case 'weigh-or-count': return { label: 'Weigh what was guessed', to: attic(subjectId) }
    case 'survey-attic': return { label: 'Survey the attic', to: attic(subjectId, '/survey') }
    case 'keep-empty-until-inspected': case 'empty-attic': case 'take-out': return { label: 'See what is stored', to: attic(subjectId) }
    case 'confirm-inventory': return { label: 'Confirm the inventory', to: attic(subjectId) }
    case 'inspect': return onAttic ? { label: 'Inspect the attic', to: attic(subjectId, '/survey') } : { label: 'See the home', to: `/units/${unitId}` }
    case 'take-reading': return onMark ? { label: 'Take the reading', to: `/marks/${subjectId}/reading` } : { label: 'See the home', to: `/units/${unitId}` }
    case 'watch-and-check-above': return onMark ? { label: 'See the mark', to: `/marks/${subjectId}` } : { label: 'See why', to: `/findings/${findingId}` }
    case 'leave-room-and-call': return { label: 'Act now: see what was reported', to: onMark ? `/marks/${subjectId}` : `/findings/${findingId}` }
    case 'unload-then-engineer': case 'look-then-engineer': case 'find-the-leak': return { label: 'Plan the job', to: `/jobs/new?unit=${unitId}&finding=${findingId}` }
    case 'finish-job': return subjectKind === 'job' ? { label: 'Open the job', to: `/jobs/${subjectId}` } : { label: 'See the jobs', to: '/upkeep' }
    case 'find-contact': return { label: 'See the home’s people', to: `/units/${unitId}` }
  }
}

/** Where what is due can be done. */
export function dueAddress(kind: DueKind, subjectId: string): string {
  switch (kind) {
    case 'reading': return `/marks/${subjectId}/reading`
    case 'inventory': return attic(subjectId)
    case 'inspection': return attic(subjectId, '/survey')
    case 'job': return `/jobs/${subjectId}`
    case 'look-again': return `/findings/${subjectId}`
    case 'invitation': return '/people'
  }
}
