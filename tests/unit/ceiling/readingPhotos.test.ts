// @vitest-environment happy-dom
import { mount } from '@vue/test-utils'
import { defineComponent, h } from 'vue'
import { describe, expect, it, vi } from 'vitest'
import { useReadingPhotos } from '../../../composables/useReadingPhotos'

const jpeg = (name = 'a.jpg') => new File([new Uint8Array([0xFF, 0xD8, 1])], name, { type: 'image/jpeg' })
const refusal = (statusCode: number, message: string) => ({ statusCode, data: { message, data: { code: 'no' } } })

/** The photos as a page has them. `answers` come one after another: an id, or what the server said instead. */
function photosOf(answers: (string | object)[]) {
  let made: ReturnType<typeof useReadingPhotos> | undefined
  const sent: string[] = []
  vi.stubGlobal('URL', Object.assign(URL, { createObjectURL: () => 'blob:invented', revokeObjectURL: () => undefined }))
  mount(defineComponent({
    setup() {
      made = useReadingPhotos('unit', { send: async (_unitId, _picture, view) => {
        sent.push(view)
        const answer = answers.shift() ?? { statusCode: 0 }
        if (typeof answer !== 'string') throw answer
        return { id: answer, view, widthPx: 1, heightPx: 1, cameraTime: null, uploadedAt: '2027-03-14T00:00:00Z' }
      } })
      return () => h('div')
    },
  }))
  return { ...made!, sent }
}

describe('useReadingPhotos', () => {
  it('sends a photo as soon as it is chosen', async () => {
    const { add, photos, previews, shares } = photosOf(['p1'])
    await add([jpeg()], 'close')
    expect(photos.value).toMatchObject([{ state: 'uploaded', photoId: 'p1', view: 'close' }])
    expect([Object.keys(previews).length, Object.keys(shares).length]).toEqual([1, 0])
  })

  it('keeps it without a signal and sends it at the next try', async () => {
    const { add, photos, uploadAll } = photosOf([{ statusCode: 0 }, refusal(503, 'away'), 'p2'])
    await add([jpeg()], 'close')
    expect(photos.value).toMatchObject([{ state: 'kept', photoId: null }])
    expect([await uploadAll(), await uploadAll(), photos.value[0]!.photoId]).toEqual([false, true, 'p2'])
  })

  it('says why a photo was refused, and goes on without it', async () => {
    const { add, photos, uploadAll, sent } = photosOf([refusal(422, 'This picture could not be read to its end.')])
    await add([jpeg()], 'close')
    expect(photos.value).toMatchObject([{ state: 'refused', problem: 'This picture could not be read to its end.' }])
    expect(await uploadAll()).toBe(true)
    expect(sent).toHaveLength(1)
  })

  it('refuses what is no photo before sending it', async () => {
    const { add, photos, sent } = photosOf([])
    await add([new File(['%PDF'], 'a.pdf')], 'close')
    expect(photos.value).toMatchObject([{ state: 'refused', problem: expect.stringContaining('JPEG') }])
    expect(sent).toEqual([])
  })

  it('takes six and no more, and forgets one that is removed', async () => {
    const { add, remove, photos, room, previews } = photosOf(['1', '2', '3', '4', '5', '6'])
    await add(Array.from({ length: 8 }, (_, i) => jpeg(`${i}.jpg`)), 'close')
    expect([photos.value.length, room.value]).toEqual([6, 0])
    remove(photos.value[0]!.localId)
    expect([photos.value.length, Object.keys(previews).length]).toEqual([5, 5])
  })
})
