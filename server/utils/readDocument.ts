import { fileTypeFromBuffer } from 'file-type'
import type { H3Event } from 'h3'
import { AtticDocumentInput } from '../../shared/schemas/attic'
import { problem, unsound } from './problems'
import { readInput } from './readInput'

const ACCEPTED = new Set(['application/pdf', 'image/jpeg', 'image/png', 'image/webp'])
const LONGEST_NAME = 200
const LARGEST_BYTES = 20 * 1000 * 1000

/** A paper with the words that go with it: multipart with `file` and the JSON part `about`. Judged by content, not by name. */
export async function readDocument(event: H3Event) {
  const form = await readFormData(event).catch(() => { throw problem(422, 'not-readable', 'The upload could not be read.') })
  const file = form.get('file')
  if (!(file instanceof File) || file.size === 0) throw unsound({ file: 'Please choose the paper: a PDF or a photo of it.' })
  if (file.size > LARGEST_BYTES) throw problem(413, 'too-large', 'A file may be at most 20 MB.', { fields: { file: 'A file may be at most 20 MB.' } })
  const input = await readInput(AtticDocumentInput, parse(form.get('about')))
  const bytes = Buffer.from(await file.arrayBuffer())
  const type = await fileTypeFromBuffer(bytes)
  if (!type || !ACCEPTED.has(type.mime)) throw problem(415, 'not-a-document', 'A PDF, JPEG, PNG or WebP file, please.', { fields: { file: 'A PDF, JPEG, PNG or WebP file, please.' } })
  return { input, file: { fileName: nameOf(file), mediaType: type.mime, bytes } }
}

/** The last part of the name, without letters that PostgreSQL or a header cannot carry, and never cut inside a letter. */
function nameOf(file: File): string {
  const last = file.name.split(/[/\\]/).at(-1)!.replace(/\p{Cc}/gu, '').toWellFormed().trim()
  return [...last].slice(0, LONGEST_NAME).join('') || 'document'
}

function parse(about: FormDataEntryValue | null): unknown {
  try { return JSON.parse(typeof about === 'string' ? about : '') }
  catch { throw problem(422, 'not-readable', 'The words that go with the paper could not be read.') }
}
