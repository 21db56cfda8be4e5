// @vitest-environment happy-dom
import { createPinia, setActivePinia } from 'pinia'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { keepPhotos } from '../../../composables/report/keptPhotos'
import type { DraftPhoto } from '../../../shared/types/reportDraft'
import { emptyDraft, useReportDraft } from '../../../stores/reportDraft'

const id = 'person.home'
const photo: DraftPhoto = { localId: 'p1', view: 'close', name: 'ceiling.jpg', state: 'kept', photoId: null, problem: null }

/** The store as a page that was just opened has it. */
function openPage() {
  setActivePinia(createPinia())
  const store = useReportDraft()
  store.load()
  return store
}

beforeEach(() => localStorage.clear())

describe('the draft of a report', () => {
  it('outlives a reload, with its key and its answers', () => {
    const before = openPage()
    before.change(id, { question: 'where', answers: { ...emptyDraft().answers, roomId: 'a room', kind: 'crack' } })
    const kept = openPage().drafts[id]
    expect(kept).toEqual(before.drafts[id])
    expect(kept).toMatchObject({ question: 'where', answers: { roomId: 'a room', kind: 'crack' } })
  })

  it('keeps one key through every change, and a new draft gets another', () => {
    const store = openPage()
    store.change(id, { noDanger: true })
    const { key } = store.drafts[id]!
    store.change(id, { isWaiting: true })
    expect(store.drafts[id]!.key).toBe(key)
    expect(key).toMatch(/^[0-9a-f-]{36}$/)
    store.drop(id)
    store.change(id, {})
    expect(store.drafts[id]!.key).not.toBe(key)
  })

  it('is one for each person and home', () => {
    const store = openPage()
    store.change(id, { noDanger: true })
    store.change('neighbour.home', { noDanger: false })
    store.drop('neighbour.home')
    expect(Object.keys(openPage().drafts)).toEqual([id])
  })

  it('changes one photo and leaves the others', () => {
    const store = openPage()
    store.change(id, { photos: [photo, { ...photo, localId: 'p2' }] })
    store.changePhoto(id, 'p2', { state: 'uploaded', photoId: 'server' })
    expect(store.drafts[id]!.photos).toEqual([photo, { ...photo, localId: 'p2', state: 'uploaded', photoId: 'server' }])
    expect(store.photoIdsInUse()).toEqual(['p1', 'p2'])
  })

  it('is not brought back by a photo that was on its way when it was dropped', () => {
    const store = openPage()
    store.change(id, { photos: [photo] })
    store.drop(id)
    store.changePhoto(id, 'p1', { state: 'uploaded', photoId: 'server' })
    expect(store.drafts).toEqual({})
  })

  it('is forgotten after a month, and what is unreadable is as if it were not there', () => {
    vi.useFakeTimers({ now: new Date('2027-01-01T00:00:00Z') })
    openPage().change(id, {})
    vi.setSystemTime(new Date('2027-01-30T00:00:00Z'))
    expect(openPage().drafts).toHaveProperty([id])
    vi.setSystemTime(new Date('2027-02-01T00:00:00Z'))
    expect(openPage().drafts).toEqual({})
    vi.useRealTimers()
    localStorage.setItem('lathkey.report-drafts', '{"broken')
    expect(openPage().drafts).toEqual({})
  })

  it('says when this browser keeps nothing, and lives on in the page', () => {
    const store = openPage()
    vi.stubGlobal('localStorage', { setItem: () => { throw new DOMException('full', 'QuotaExceededError') } })
    store.change(id, { noDanger: true })
    expect(store.isKept).toBe(false)
    expect(store.drafts[id]!.noDanger).toBe(true)
    vi.unstubAllGlobals()
    store.change(id, {})
    expect(store.isKept).toBe(true)
  })
})

describe('pictures that are not sent yet', () => {
  const picture = new Blob(['drawn'])
  const forbidding = { open: () => { throw new DOMException('no', 'SecurityError') } } as unknown as IDBFactory

  it.each([['without a database', undefined], ['with one that is forbidden', forbidding]])('%s, live as long as the page', async (_name, factory) => {
    const kept = keepPhotos(factory)
    await kept.put('p1', picture)
    await kept.sweep([])
    expect(await kept.get('p1')).toBe(picture)
    await kept.remove(['p1'])
    expect(await kept.get('p1')).toBeUndefined()
  })
})
