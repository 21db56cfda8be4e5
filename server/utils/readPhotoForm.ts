import type { H3Event } from 'h3'
import { getHeader, readFormData } from 'h3'
import { MAX_PHOTO_BYTES, PHOTO_VIEWS, type PhotoView } from '../../shared/types/photo'
import { tooLarge } from './photoImage'
import { problem, unsound } from './problems'

/** One photo from a multipart form: the file under `photo`, what it shows under `view`. Call it only after admit(). */
export async function readPhotoForm(event: H3Event): Promise<{ bytes: Buffer, view: PhotoView }> {
  if (!(getHeader(event, 'content-type') ?? '').startsWith('multipart/form-data')) {
    throw problem(415, 'not-a-form', 'This address takes a form with one photo in it.')
  }
  const form = await readFormData(event).catch(() => {
    throw problem(422, 'broken-form', 'The form arrived in pieces and could not be read. Please send the photo again.')
  })
  const files = form.getAll('photo')
  const file = files[0]
  if (!file || typeof file === 'string') throw unsound({ photo: 'Choose a photo first.' })
  if (files.length > 1) throw unsound({ photo: 'Send one photo at a time.' })
  if (file.size > MAX_PHOTO_BYTES) throw tooLarge()
  const view = form.get('view') ?? 'close'
  if (!isView(view)) throw unsound({ view: 'Say what the photo shows: wide, close, before, after or item.' })
  return { bytes: Buffer.from(await file.arrayBuffer()), view }
}

const isView = (value: unknown): value is PhotoView => (PHOTO_VIEWS as readonly unknown[]).includes(value)
