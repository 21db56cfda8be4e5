import { randomBytes } from 'node:crypto'
import { contentPolicy } from '../utils/contentPolicy'

/** A fresh nonce for every page that is rendered; middleware/3.keptPages.ts gives a kept one a fresh one too. */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('render:html', (html, { event }) => {
    const nonce = randomBytes(16).toString('base64')
    event.context.nonce = nonce
    const mark = (part: string) => part.replace(/<script(?![^>]*\bnonce=)/g, `<script nonce="${nonce}"`)
    html.head = html.head.map(mark)
    html.bodyPrepend = html.bodyPrepend.map(mark)
    html.bodyAppend = html.bodyAppend.map(mark)
    setResponseHeader(event, 'content-security-policy', contentPolicy(nonce))
  })
})
