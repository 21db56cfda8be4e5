import type { AdviceCode, FindingSubjectKind } from '../../types/finding'
import type { DueKind } from '../upkeep/dueItems'

export interface NextStep { label: string, to: string }

type Place = { subjectKind: FindingSubjectKind | 'item' | 'observation', subjectId: string, unitId: string, findingId: string }

const attic = (id: string, part = '') => `/attics/${id}${part}`

/** The one thing that would settle a finding, as a button: its words and the page it opens. */
export function nextStep(adviceCode: AdviceCode, { subjectKind, subjectId, unitId, findingId }: Place): NextStep {
  const home = { label: 'See the home', to: `/units/${unitId}` }
  const onAttic = (label: string, part = ''): NextStep => subjectKind === 'attic' ? { label, to: attic(subjectId, part) } : home
  const onMark = (label: string, part: string, otherwise: NextStep): NextStep => subjectKind === 'mark' ? { label, to: `/marks/${subjectId}${part}` } : otherwise
  switch (adviceCode) {
    case 'stop-adding-and-unload': case 'stop-adding': case 'move-to-bearing-walls': case 'mend-place': return onAttic('Open the load plan', '/load-plan')
    case 'weigh-or-count': return onAttic('Weigh what was guessed')
    case 'survey-attic': return onAttic('Survey the attic', '/survey')
    case 'keep-empty-until-inspected': case 'empty-attic': case 'take-out': return onAttic('See what is stored')
    case 'confirm-inventory': return onAttic('Confirm the inventory')
    case 'inspect': return onAttic('Inspect the attic', '/survey')
    case 'take-reading': return onMark('Take the reading', '/reading', home)
    case 'watch-and-check-above': return onMark('See the mark', '', { label: 'See why', to: `/findings/${findingId}` })
    case 'leave-room-and-call': return onMark('Act now: see what was reported', '', { label: 'Act now: see what was reported', to: `/findings/${findingId}` })
    case 'unload-then-engineer': case 'look-then-engineer': return { label: 'Call an engineer: plan the visit', to: `/jobs/new?unit=${unitId}&finding=${findingId}` }
    case 'find-the-leak': return { label: 'Plan the job', to: `/jobs/new?unit=${unitId}&finding=${findingId}` }
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
