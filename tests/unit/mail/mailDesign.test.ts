import { describe, expect, it } from 'vitest'
import { renderMail, type MailContent } from '../../../server/utils/mailDesign'

const content: MailContent = {
  subject: 'Two things at 4 Alder Row',
  heading: 'Two things need you',
  paragraphs: ['The attic above the hall holds more than it is rated for.'],
  items: [{ title: 'Attic over its rating', detail: '1,240 lb of 900 lb', href: 'https://lathkey.example/findings/1?a=1&b=2', label: 'See why' }],
  action: { label: 'Open the list', href: 'https://lathkey.example/findings' },
  footer: ['You get this because you manage these homes. Switch it off at https://lathkey.example/account.'],
}

describe('the design of a mail', () => {
  it('says the same words as text and as HTML', () => {
    const { text, html } = renderMail(content)
    for (const words of ['Two things need you', 'more than it is rated for', 'Attic over its rating', '1,240 lb of 900 lb', 'See why', 'You get this because']) {
      expect(text.replace(/\s+/g, ' ')).toContain(words)
      expect(html).toContain(words)
    }
    expect(text).toContain('https://lathkey.example/findings/1?a=1&b=2')
    expect(html).toContain('href="https://lathkey.example/findings/1?a=1&#38;b=2"')
  })

  it('keeps every line of text within 78 characters, bar addresses', () => {
    const { text } = renderMail({ ...content, paragraphs: ['word '.repeat(200).trim()] })
    for (const line of text.split('\n')) expect(line.includes('https://') || line.length <= 78).toBe(true)
  })

  it('tells mail programs that it reads on light and on dark, and fetches nothing', () => {
    const { html } = renderMail(content)
    expect(html).toContain('<meta name="color-scheme" content="light dark">')
    expect(html).toContain('prefers-color-scheme:dark')
    expect(html).not.toMatch(/<img|background-image|<script|@import|<link/)
    expect(html).not.toMatch(/<(p|h1|div)[^>]*[^-]color:#/)
  })

  it('stays under 100 kB with 500 items, and says how many were left out', () => {
    const items = Array.from({ length: 500 }, (_, n) => ({ title: `Thing ${n} ${'x'.repeat(80)}`, detail: 'y'.repeat(200), href: `https://lathkey.example/findings/${n}`, label: 'See why' }))
    const { html, text } = renderMail({ ...content, items })
    expect(Buffer.byteLength(html)).toBeLessThan(100_000)
    expect(html).toContain('And 440 more')
    expect(text).toContain('And 440 more')
  })

  it('lets nobody write HTML or a second header through a name', () => {
    const { html, subject } = renderMail({ ...content, subject: 'Hello\r\nBcc: all@homes.example', heading: '<b>"Alder" & Row</b>' })
    expect(subject).toBe('Hello Bcc: all@homes.example')
    expect(html).toContain('&#60;b&#62;&#34;Alder&#34; &#38; Row&#60;/b&#62;')
    expect(html).not.toContain('<b>')
  })

  it('makes the addresses in the footer links', () => {
    expect(renderMail(content).html).toMatch(/<a class="link" href="https:\/\/lathkey\.example\/account"[^>]*>https:\/\/lathkey\.example\/account<\/a>\./)
  })
})
