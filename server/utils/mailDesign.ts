/** What a mail says, before it is laid out. Every href is absolute (appUrl). */
export interface MailContent {
  subject: string
  heading: string
  paragraphs: string[]
  items?: MailItem[]
  /** Items under headings of their own: one home each. */
  groups?: { heading: string, items: MailItem[] }[]
  action?: { label: string, href: string }
  /** Why the person gets this, and what they can do about it. */
  footer: string[]
}

export interface MailItem { title: string, detail: string, href: string, label: string }
export interface RenderedMail { subject: string, text: string, html: string }

const LINE_CHARACTERS = 72
/** Below what mail programs cut off at (about 100 kB, common practice): the rest is named by its number. */
const MOST_ITEMS = 60

/** Our own plain design: text first, the same words as HTML. No pictures, nothing fetched, no tracking. */
export function renderMail(content: MailContent): RenderedMail {
  const { groups, left } = cutGroups([...(content.items ? [{ heading: '', items: content.items }] : []), ...(content.groups ?? [])])
  const shown = { ...content, groups, more: left > 0 ? `And ${left} more. You find them all after signing in.` : undefined }
  return { subject: oneLine(content.subject), text: asText(shown), html: asHtml(shown) }
}

type Shown = MailContent & { groups: NonNullable<MailContent['groups']>, more?: string }

function cutGroups(groups: NonNullable<MailContent['groups']>) {
  let room = MOST_ITEMS
  const all = groups.reduce((sum, group) => sum + group.items.length, 0)
  const kept = groups.flatMap((group) => {
    const items = group.items.slice(0, room)
    room -= items.length
    return items.length > 0 ? [{ ...group, items }] : []
  })
  return { groups: kept, left: Math.max(0, all - MOST_ITEMS) }
}

function asText({ heading, paragraphs, groups, more, action, footer }: Shown): string {
  const parts = [
    heading, '='.repeat(Math.min(heading.length, LINE_CHARACTERS)), '',
    ...paragraphs.flatMap(paragraph => [wrap(paragraph), '']),
    ...groups.flatMap(group => [
      ...(group.heading ? [group.heading, '-'.repeat(Math.min(group.heading.length, LINE_CHARACTERS))] : []),
      ...group.items.flatMap(item => [wrap(`* ${item.title}`), ...(item.detail ? [wrap(`  ${item.detail}`)] : []), `  ${item.label}: ${item.href}`, '']),
    ]),
    ...(more ? [more, ''] : []),
    ...(action ? [`${action.label}:`, action.href, ''] : []),
    '--', ...footer.map(wrap),
  ]
  return `${parts.join('\n')}\n`
}

function wrap(text: string): string {
  const lines: string[] = []
  for (const word of text.split(' ')) {
    const last = lines.at(-1)
    if (last !== undefined && last.length + 1 + word.length <= LINE_CHARACTERS) lines[lines.length - 1] = `${last} ${word}`
    else lines.push(word)
  }
  return lines.join('\n')
}

/**
 * Text takes the mail program's own colour, so that it reads on light and dark alike; only links have one,
 * with a lighter one for dark. Programs that darken by themselves turn both round.
 */
const LINK = 'color:#17635A;font-weight:bold;text-decoration:underline'
const FONT = 'font-family:\'Nunito Sans\',\'Segoe UI\',Helvetica,Arial,sans-serif'
const RULE = 'border-top:1px solid #8A8F86'

function asHtml({ subject, heading, paragraphs, groups, more, action, footer }: Shown): string {
  const link = (href: string, label: string) => `<a class="link" href="${escape(href)}" style="${LINK}">${escape(label)}</a>`
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark"><meta name="supported-color-schemes" content="light dark">
<title>${escape(oneLine(subject))}</title>
<style>:root{color-scheme:light dark;supported-color-schemes:light dark}@media (prefers-color-scheme:dark){a.link{color:#7CC7BA!important}}</style>
</head><body style="margin:0;padding:0">
<div role="article" style="max-width:600px;margin:0 auto;padding:24px 16px;${FONT};font-size:16px;line-height:1.5">
<h1 style="margin:0 0 16px;font-size:22px;line-height:1.3">${escape(heading)}</h1>
${paragraphs.map(paragraph => `<p style="margin:0 0 16px">${escape(paragraph)}</p>`).join('\n')}
${groups.map(group => `${group.heading ? `<h2 style="margin:24px 0 8px;font-size:18px;line-height:1.3">${escape(group.heading)}</h2>` : ''}
${group.items.map(item => `<div style="${RULE};padding:12px 0"><p style="margin:0;font-weight:bold">${escape(item.title)}</p>
${item.detail ? `<p style="margin:4px 0 0">${escape(item.detail)}</p>` : ''}<p style="margin:8px 0 0">${link(item.href, item.label)}</p></div>`).join('\n')}`).join('\n')}
${more ? `<p style="margin:16px 0">${escape(more)}</p>` : ''}
${action ? `<p style="margin:24px 0"><a class="link" href="${escape(action.href)}" style="${LINK};display:inline-block;padding:12px 20px;border:2px solid;border-radius:2px;text-decoration:none">${escape(action.label)}</a></p>` : ''}
<div style="${RULE};margin-top:24px;padding-top:12px;font-size:14px">
${footer.map(line => `<p style="margin:0 0 8px">${withLinks(escape(line))}</p>`).join('\n')}
</div></div></body></html>
`
}

const escape = (text: string) => text.replace(/[&<>"']/g, character => `&#${character.charCodeAt(0)};`)
const withLinks = (escaped: string) => escaped.replace(/https?:\/\/[^\s<&]+[^\s<&.,]/g, href => `<a class="link" href="${href}" style="${LINK}">${href}</a>`)
/** A subject is one line: a line break in it would start a new header. */
const oneLine = (text: string) => text.replace(/\s+/g, ' ').trim().slice(0, 200)
