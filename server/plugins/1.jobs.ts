import { startBackground } from '../utils/background'

/** Numbered, so that its close hook runs before the one that ends the database pool. */
export default defineNitroPlugin((nitro) => {
  const databaseUrl = process.env.DATABASE_URL
  if (!databaseUrl || process.env.LATHKEY_BACKGROUND === 'off') return
  const background = startBackground({ databaseUrl, smtpUrl: process.env.SMTP_URL, mailFrom: process.env.MAIL_FROM || 'Lathkey <post@lathkey.example>' })
  nitro.hooks.hook('close', () => background.stop())
})
