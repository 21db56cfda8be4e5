import { parseArgs } from 'node:util'
import { startFakeMail } from './startFakeMail'

const { values } = parseArgs({ options: {
  'folder': { type: 'string' },
  'smtp-port': { type: 'string', default: '0' },
  'web-port': { type: 'string', default: '0' },
} })

const mail = await startFakeMail({ folder: values.folder, smtpPort: Number(values['smtp-port']), webPort: Number(values['web-port']) })
console.log(JSON.stringify({ smtpUrl: mail.smtpUrl, inboxUrl: mail.inboxUrl }))

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
  process.on(signal, () => mail.close().then(() => process.exit(0)))
}
