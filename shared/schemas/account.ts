import { z } from 'zod'
import { PASSWORD_MAX_LENGTH, PASSWORD_MIN_LENGTH } from '../utils/passwordRule'

/** Kept and compared in lower case, without blanks around it. */
export const EmailInput = z.string('What is your e-mail address?').trim().toLowerCase()
  .min(1, 'What is your e-mail address?').max(254, 'This address is too long to be one.')
  .pipe(z.email('Write an e-mail address, such as name@home.example.'))

export const NewPasswordInput = z.string('Choose a password.')
  .min(PASSWORD_MIN_LENGTH, `Use at least ${PASSWORD_MIN_LENGTH} characters.`)
  .max(PASSWORD_MAX_LENGTH, `Use at most ${PASSWORD_MAX_LENGTH} characters.`)

const KnownPasswordInput = z.string('What is your password?').min(1, 'What is your password?')
  .max(PASSWORD_MAX_LENGTH, `A password here has at most ${PASSWORD_MAX_LENGTH} characters.`)

export const PersonNameInput = z.string('What is your name?').trim().min(1, 'What is your name?').max(120, 'Use at most 120 characters.')

export const PhoneInput = z.string().trim().max(40, 'Use at most 40 characters.').transform(text => text || null).nullable()

/** The browser's own zone; one the server does not know is passed over, for nobody typed it. */
const TimeZoneInput = z.string().max(64).optional().transform(zone => zone && isTimeZone(zone) ? zone : undefined)

export const SignUpInput = z.strictObject({
  organisationName: z.string('What is the name of your household or firm?').trim()
    .min(1, 'What is the name of your household or firm?').max(120, 'Use at most 120 characters.'),
  name: PersonNameInput,
  email: EmailInput,
  timeZone: TimeZoneInput,
})
export type SignUp = z.output<typeof SignUpInput>

export const SignInInput = z.strictObject({ email: EmailInput, password: KnownPasswordInput })
export type SignIn = z.output<typeof SignInInput>

/** A new person's password, or the one of the account that the address has; the command knows which. */
export const BeginInput = z.strictObject({ password: KnownPasswordInput })

export const ForgottenPasswordInput = z.strictObject({ email: EmailInput })

export const ResetPasswordInput = z.strictObject({ password: NewPasswordInput })

export const ChangePasswordInput = z.strictObject({ current: KnownPasswordInput, password: NewPasswordInput })
  .refine(input => input.current !== input.password, { path: ['password'], message: 'This is the password you have now. Choose another one.' })
export type ChangePassword = z.output<typeof ChangePasswordInput>

export const AccountInput = z.strictObject({
  version: z.int().min(1),
  name: PersonNameInput,
  phone: PhoneInput,
  unitsOfMeasure: z.enum(['us', 'metric'], 'Choose feet and pounds, or metres and kilograms.'),
  digest: z.boolean('Say whether the daily digest should come.'),
})
export type AccountEdit = z.output<typeof AccountInput>

export const SwitchOrganisationInput = z.strictObject({ organisationId: z.uuid('Choose one of your organisations.') })

function isTimeZone(zone: string): boolean {
  try { return Boolean(new Intl.DateTimeFormat('en', { timeZone: zone })) }
  catch { return false }
}
