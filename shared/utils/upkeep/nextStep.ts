import type { AdviceCode, FindingSubject } from '../../types/finding'

export interface NextStep { to: string, label: string }

/** Where the advice of a finding is carried out: the page of ours, and what its link says. Undefined when no page does it. */
export function nextStepOf(finding: { adviceCode: AdviceCode, subject: FindingSubject }, unitId: string): NextStep | undefined {
  const { kind, id } = finding.subject
  if (finding.adviceCode === 'find-contact') return { to: `/people/invite?unit=${unitId}`, label: 'Invite the tenant' }
  if (kind === 'job') return { to: `/jobs/${id}`, label: 'Open the job' }
  if (kind === 'attic') return atticStep(finding.adviceCode, id)
  if (kind === 'mark') return finding.adviceCode === 'take-reading' ? { to: `/marks/${id}/reading`, label: 'Take the reading' } : { to: `/marks/${id}`, label: 'Open the mark' }
  return undefined
}

function atticStep(advice: AdviceCode, atticId: string): NextStep {
  if (advice === 'survey-attic') return { to: `/attics/${atticId}/survey`, label: 'Survey the attic' }
  if (advice === 'inspect' || advice === 'keep-empty-until-inspected' || advice === 'confirm-inventory') return { to: `/attics/${atticId}`, label: 'Open the attic' }
  return { to: `/attics/${atticId}/load-plan`, label: 'Open the load plan' }
}
