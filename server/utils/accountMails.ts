import { appUrl } from './appUrl'
import type { MailContent } from './mailDesign'

export function passwordChangedMail(name: string): MailContent {
  return {
    subject: 'Your password was changed',
    heading: 'Your password was changed',
    paragraphs: [
      `Hello ${name}, the password of your Lathkey account has just been changed, and every other device was signed out.`,
      'If that was you, there is nothing to do. If it was not, set a new password now: whoever changed it is then signed out.',
    ],
    action: { label: 'Set a new password', href: appUrl('/forgotten-password') },
    footer: ['You get this because it concerns your account. It cannot be switched off.'],
  }
}

export function passwordResetMail(name: string, token: string): MailContent {
  return {
    subject: 'Set a new password',
    heading: 'Set a new password',
    paragraphs: [
      `Hello ${name}, somebody asked for a new password for this address. If it was you, follow the link within one hour. It works once.`,
      'If it was not you, there is nothing to do: your password stays as it is.',
    ],
    action: { label: 'Set a new password', href: appUrl(`/reset-password/${token}`) },
    footer: ['You get this because somebody typed this address on our sign-in page.'],
  }
}

export function signUpMail({ name, organisationName }: { name: string, organisationName: string }, token: string): MailContent {
  return {
    subject: 'Begin with Lathkey',
    heading: `Set up ${organisationName}`,
    paragraphs: [
      `Hello ${name}, somebody asked to keep the homes of ${organisationName} with Lathkey, with this address. If it was you, follow the link within one day. It works once.`,
      'If it was not you, there is nothing to do: nothing is set up until the link is followed.',
    ],
    action: { label: 'Set up the account', href: appUrl(`/begin/${token}`) },
    footer: ['You get this because somebody typed this address on our sign-up page.'],
  }
}
