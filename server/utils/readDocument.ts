import { fileTypeFromBuffer } from 'file-type'
import type { H3Event } from 'h3'
import { AtticDocumentInput } from '../../shared/schemas/attic'
import { problem, unsound } from './problems'
import { readInput } from './readInput'

const ACCEPTED = new Set(['application/pdf', 'image/jpeg', 'image/png', 'image/webp'])

/** A paper with the words that go with it: multipart with `file` and the JSON part `about`. Judged by content, not by name. */
export async function readDocument(event: H3Event) {
  const form = await readFormData(event).catch(() => { throw problem(422, 'not-readable', 'The upload could not be read.') })
  const file = form.get('file')
  const about = form.get('about')
  if (!(file instanceof File) || file.size === 0) throw unsound({ file: 'Please choose the paper: a PDF or a photo of it.' })
  const input = await readInput(AtticDocumentInput, parse(about))
  const bytes = Buffer.from(await file.arrayBuffer())
  const type = await fileTypeFromBuffer(bytes)
  if (!type || !ACCEPTED.has(type.mime)) throw problem(415, 'not-a-document', 'A PDF, JPEG, PNG or WebP file, please.', { fields: { file: 'A PDF, JPEG, PNG or WebP file, please.' } })
  return { input, file: { fileName: file.name || 'document', mediaType: type.mime, bytes } }
}

function parse(about: FormDataEntryValue | null): unknown {
  try { return JSON.parse(typeof about === 'string' ? about : '') }
  catch { throw problem(422, 'not-readable', 'The words that go with the paper could not be read.') }
}
