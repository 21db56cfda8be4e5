import { randomBytes } from 'node:crypto'

/**
 * A fresh nonce a page: only scripts that this render wrote may run. Charts and Vue style bindings
 * need inline styles, scripts do not.
 */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('render:html', (html, { event }) => {
    const nonce = randomBytes(16).toString('base64')
    const mark = (part: string) => part.replace(/<script(?![^>]*\bnonce=)/g, `<script nonce="${nonce}"`)
    html.head = html.head.map(mark)
    html.bodyPrepend = html.bodyPrepend.map(mark)
    html.bodyAppend = html.bodyAppend.map(mark)
    setResponseHeader(event, 'content-security-policy', [
      'default-src \'none\'',
      `script-src 'self' 'nonce-${nonce}'`,
      'style-src \'self\' \'unsafe-inline\'',
      'img-src \'self\' blob: data:',
      'font-src \'self\'',
      'connect-src \'self\'',
      'manifest-src \'self\'',
      'worker-src \'self\' blob:',
      'form-action \'self\'',
      'base-uri \'none\'',
      'frame-ancestors \'none\'',
    ].join('; '))
  })
})
