import type { MailBehaviour } from './behaviour'
import { inboxStyle } from './inboxStyle'
import type { FakeMessage } from './messageStore'

const entities: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', '\'': '&#39;' }
export const escapeHtml = (text: string) => text.replace(/[&<>"']/g, sign => entities[sign] ?? sign)

const withLinks = (text: string) => escapeHtml(text)
  .replace(/https?:\/\/[^\s<]*[^\s<.,;:)]/g, address => `<a href="${address}" target="_blank" rel="noopener noreferrer">${address}</a>`)

const clock = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit' })
const timeOf = (message: FakeMessage) => `<time datetime="${message.receivedAt}">${clock.format(new Date(message.receivedAt))}</time>`

function page(title: string, body: string) {
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>${escapeHtml(title)}</title>
<meta name="viewport" content="width=device-width, initial-scale=1"><link rel="icon" href="data:,">
<style>${inboxStyle}</style></head><body><main>${body}</main></body></html>`
}

const modeWords: Record<MailBehaviour['mode'], string> = {
  accept: '', refuse: 'refuses mail for now', bounce: 'answers that the mailbox does not exist', hang: 'takes connections and says nothing',
  drop: 'cuts the line after taking a message', slow: 'answers slowly',
}

function modeNote({ mode, recipients }: MailBehaviour) {
  if (mode === 'accept') return ''
  return `<p class="alarm">Trouble on purpose: this server ${modeWords[mode]}${recipients.length > 0 ? ` (for ${escapeHtml(recipients.join(', '))})` : ''}.</p>`
}

export function listPage(messages: FakeMessage[], behaviour: MailBehaviour, recipient: string) {
  const rows = [...messages].reverse().map(message => `<li><a href="/mail/${message.id}"><span>${escapeHtml(message.recipients.join(', '))}</span>
<strong>${escapeHtml(message.subject || 'No subject')}</strong>${timeOf(message)}</a></li>`).join('')
  const everybody = recipient ? `<a href="/">Mail to everybody</a>` : ''
  return page('Trial mail', `<h1>Trial mail</h1>
<p class="quiet">Everything Lathkey sends from this machine arrives here and goes no further.</p>${modeNote(behaviour)}
<nav aria-label="Mail"><a href="">Look again</a>${everybody}</nav>
<h2>${recipient ? `To ${escapeHtml(recipient)}` : 'To everybody'}, newest first</h2>
${rows ? `<ol class="mails">${rows}</ol>` : '<p>Nothing yet. Invite somebody or report a mark, and the mail appears here.</p>'}`)
}

export function messagePage(message: FakeMessage) {
  const recipients = message.recipients.map(address => `<a href="/?to=${encodeURIComponent(address)}">${escapeHtml(address)}</a>`).join(', ')
  const attachments = message.attachments.map(({ filename, contentType, sizeBytes }) => `<li>${escapeHtml(filename || 'unnamed')}, ${escapeHtml(contentType)}, ${sizeBytes} bytes</li>`).join('')
  return page(message.subject || 'No subject', `<nav aria-label="Mail"><a href="/">All trial mail</a><a href="/mail/${message.id}/raw">As it was sent</a></nav>
<h1>${escapeHtml(message.subject || 'No subject')}</h1>
<dl><dt>From</dt><dd>${escapeHtml(message.from)}</dd><dt>To</dt><dd>${recipients}</dd><dt>Received</dt><dd>${timeOf(message)}</dd></dl>
${message.acknowledged ? '' : '<p class="alarm">The line was cut before the sender heard that this arrived.</p>'}
${message.html ? `<h2>Formatted</h2><iframe title="Formatted message" src="/mail/${message.id}/html" sandbox="allow-popups allow-popups-to-escape-sandbox"></iframe>` : ''}
<h2>Plain text</h2>${message.text ? `<pre>${withLinks(message.text)}</pre>` : '<p>This message has no plain text part.</p>'}
${attachments ? `<h2>Attached</h2><ul>${attachments}</ul>` : ''}
<details><summary>Headers</summary><pre>${escapeHtml(message.headers.map(({ name, value }) => `${name}: ${value}`).join('\n'))}</pre></details>`)
}

export const missingPage = () => page('Not here', '<h1>There is no such message</h1><p><a href="/">All trial mail</a></p>')

/** Links leave the frame, since a mail is read here to follow its link. */
export const framedHtml = (message: FakeMessage) => `<base target="_blank">${message.html}`
