import type { H3Event } from 'h3'
import { setResponseHeaders } from 'h3'

/** A document made for its asker: never kept by anybody in between, shown in the browser under a telling file name. */
export function sendPaper(event: H3Event, bytes: Buffer, name: string): Buffer {
  setResponseHeaders(event, {
    'content-type': 'application/pdf',
    'content-length': bytes.length,
    'content-disposition': `inline; filename="${fileNameOf(name)}.pdf"`,
    'cache-control': 'private, no-store',
  })
  return bytes
}

/** Letters and digits of ASCII only, so that every browser keeps the name. */
export const fileNameOf = (name: string) =>
  name.normalize('NFKD').replace(/[\u0300-\u036F]/g, '').replace(/[^A-Za-z0-9]+/g, '-').replace(/^-+|-+$/g, '').slice(0, 80).toLowerCase() || 'paper'
