import { formatDay } from '../../shared/utils/days'
import { INVITATION_DAYS } from '../../shared/types/invitation'
import type { Role } from '../../shared/types/people'
import { ROLE_WORDS } from '../../shared/utils/roleWords'
import { appUrl } from './appUrl'
import type { MailContent } from './mailDesign'

export interface InvitationFacts {
  token: string
  role: Role
  organisationName: string
  contactPhone: string | null
  inviterName: string
  home: string | null
  untilOn: string | null
}

const PURPOSE: Record<Role, (facts: InvitationFacts) => string> = {
  owner: ({ organisationName }) => `As an owner you see and decide everything ${organisationName} keeps about its homes.`,
  manager: ({ organisationName }) => `As a manager you keep the homes of ${organisationName}: attics, ceilings, findings, jobs and people.`,
  tenant: ({ home }) => `It is about your home, ${home}. You can report a crack, a stain or a sag in a ceiling from your phone in about two minutes, and see what is done about it.`,
  trades: ({ organisationName }) => `You see the jobs ${organisationName} gives you, how to get in, and you can say when they are done.`,
  engineer: ({ home, untilOn }) => `You can read the file of ${home}: survey, loads, marks, readings and photos${untilOn ? `, until ${formatDay(untilOn)}` : ''}.`,
}

export function invitationMail(facts: InvitationFacts): MailContent {
  const { role, organisationName, inviterName, contactPhone, token } = facts
  return {
    subject: `${organisationName} invites you to Lathkey`,
    heading: `You are invited as ${ROLE_WORDS[role].article}`,
    paragraphs: [
      `${inviterName} of ${organisationName} invites you to Lathkey, where they look after their homes.`,
      PURPOSE[role](facts),
      ...(role === 'tenant' ? [dangerWords(contactPhone)] : []),
      `The link below works once, within ${INVITATION_DAYS} days, and only for this address.`,
    ],
    action: { label: 'See the invitation', href: appUrl(`/invitation/${token}`) },
    footer: [`You get this because ${inviterName} gave this address. If you do not know ${organisationName}, there is nothing to do.`],
  }
}

/** Common practice; the danger signs of our own list. Somebody in danger must not look for a link first. */
const dangerWords = (contactPhone: string | null) =>
  `Do not wait for any of this when a ceiling sags, bulges, drips, drops bits or makes cracking sounds: leave the room and call for help${contactPhone ? `, then call ${contactPhone}` : ''}.`
