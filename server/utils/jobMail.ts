import { formatDay } from '../../shared/utils/days'
import { JOB_PRIORITY_WORDS } from '../../shared/utils/messages/jobMessages'
import { ATTIC_WORK, hazardCautions } from '../../shared/utils/messages/safety'
import type { JobPriority } from '../../shared/types/job'
import { appUrl } from './appUrl'
import { homeOf } from './findingMail'
import type { MailContent } from './mailDesign'

interface AssignedJob { id: string, number: number, title: string, priority: JobPriority, dueOn: string, scheduledOn: string | null, atticId: string | null, yearBuilt: number | null }

/** To whoever is given a job: what, where, by when, and what to know before starting. */
export function assignedJobMail(job: AssignedJob, place: { unitName: string, propertyName: string, organisationName: string }): MailContent {
  const when = job.scheduledOn ? `Planned for ${formatDay(job.scheduledOn)}, due by ${formatDay(job.dueOn)}.` : `Due by ${formatDay(job.dueOn)}.`
  return {
    subject: `Job ${job.number}: ${job.title} · ${homeOf(place)}`,
    heading: job.title,
    paragraphs: [
      `${place.organisationName} gave you job ${job.number} at ${homeOf(place)}. ${JOB_PRIORITY_WORDS[job.priority]}. ${when}`,
      ...hazardCautions(job.yearBuilt).map(hazard => hazard.sentence),
      ...(job.atticId ? [ATTIC_WORK] : []),
    ],
    action: { label: 'Open the job', href: appUrl(`/jobs/${job.id}`) },
    footer: [`You get this because you do jobs for ${place.organisationName}. Your address can be changed at ${appUrl('/account')}.`],
  }
}
