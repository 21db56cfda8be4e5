// @vitest-environment happy-dom
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { enableAutoUnmount, RouterLinkStub } from '@vue/test-utils'
import { nextTick } from 'vue'
import FrameBar from '../../../components/ui/FrameBar.vue'
import PhoneBar from '../../../components/ui/PhoneBar.vue'
import UiBreadcrumb from '../../../components/ui/UiBreadcrumb.vue'
import UiButton from '../../../components/ui/UiButton.vue'
import UiClash from '../../../components/ui/UiClash.vue'
import UiDay from '../../../components/ui/UiDay.vue'
import UiEmpty from '../../../components/ui/UiEmpty.vue'
import UiNotice from '../../../components/ui/UiNotice.vue'
import UiProgress from '../../../components/ui/UiProgress.vue'
import UiSafety from '../../../components/ui/UiSafety.vue'
import UiStateWord from '../../../components/ui/UiStateWord.vue'
import UiTable from '../../../components/ui/UiTable.vue'
import UiTitleBlock from '../../../components/ui/UiTitleBlock.vue'
import UiUndo from '../../../components/ui/UiUndo.vue'
import UiVerdict from '../../../components/ui/UiVerdict.vue'
import { safetyWords } from '../../../components/ui/safetyWords'
import { LEAVE_ROOM_SIGNS, TRUSS_CAUTION } from '../../../shared/utils/messages/safety'
import { frameEntries, isWithin } from '../../../components/ui/frameNav'
import { wordsForError } from '../../../components/ui/errorWords'
import { timeZoneKey } from '../../../components/ui/dayText'
import { mountUi } from './mountUi'

const plain = (text: string) => text.replaceAll('\u00A0', ' ')

enableAutoUnmount(afterEach)

describe('a button', () => {
  it('that is busy says so, keeps the focus and passes no presses on', async () => {
    const button = mountUi(UiButton, { props: { busy: true, busyText: 'Saving' }, slots: { default: 'Save' } })
    button.get('button').element.focus()
    await button.get('button').trigger('click')
    expect(button.emitted('click')).toBeUndefined()
    expect(button.get('[role=status]').text()).toBe('Saving')
    expect(button.get('button').attributes('aria-busy')).toBe('true')
    expect(document.activeElement).toBe(button.get('button').element)
  })

  it('that is busy does not send its form', async () => {
    const button = mountUi(UiButton, { props: { submit: true, busy: true } })
    const press = new MouseEvent('click', { cancelable: true })
    button.get('button').element.dispatchEvent(press)
    expect(press.defaultPrevented).toBe(true)
  })

  it('is a link when it leads somewhere', () => {
    expect(mountUi(UiButton, { props: { to: '/homes' } }).getComponent(RouterLinkStub).props('to')).toBe('/homes')
    expect(mountUi(UiButton, { props: { href: 'tel:5550100' } }).get('a').attributes('href')).toBe('tel:5550100')
  })

  it('presses once when pressed', async () => {
    const button = mountUi(UiButton)
    await button.get('button').trigger('click')
    expect(button.emitted('click')).toHaveLength(1)
    expect(button.get('button').attributes('type')).toBe('button')
  })
})

describe('a table', () => {
  const columns = [{ key: 'what', label: 'Stored', sortable: true }, { key: 'lb', label: 'Weight, lb', numeric: true }]
  const rows = [{ id: 1, what: 'Paper', lb: 165 }, { id: 2, what: 'Tools', lb: null }]
  const props = { caption: 'Stored', columns, rows, rowKey: (row: object) => (row as { id: number }).id }

  it('has a caption, column headings and a row for each thing', () => {
    const table = mountUi(UiTable, { props })
    expect(table.get('caption').text()).toBe('Stored')
    expect(table.findAll('th[scope=col]')).toHaveLength(2)
    expect(table.findAll('tbody tr').map(row => row.findAll('td').map(cell => cell.get('span:last-child').text()))).toEqual([['Paper', '165'], ['Tools', '—']])
  })

  it('names each cell when its rows are stacked', () => {
    expect(mountUi(UiTable, { props }).findAll('tbody tr:first-child .cell-label').map(label => label.text())).toEqual(['Stored', 'Weight, lb'])
  })

  it('asks to be sorted, the other way round the second time', async () => {
    const table = mountUi(UiTable, { props })
    await table.get('th button').trigger('click')
    await table.setProps({ sort: { key: 'what', direction: 'ascending' } })
    expect(table.get('th').attributes('aria-sort')).toBe('ascending')
    await table.get('th button').trigger('click')
    expect(table.emitted('sort')).toEqual([[{ key: 'what', direction: 'ascending' }], [{ key: 'what', direction: 'descending' }]])
  })

  it('says so when it has no rows', () => {
    const table = mountUi(UiTable, { props: { ...props, rows: [] }, slots: { empty: 'Items you add will stand here.' } })
    expect(table.text()).toContain('Items you add will stand here.')
  })
})

describe('a day', () => {
  it('is written so that it never wraps, with the machine form beside it', () => {
    const day = mountUi(UiDay, { props: { value: '2027-03-14' } })
    expect(plain(day.get('time').text())).toBe('14 Mar 2027')
    expect(day.get('time').attributes('datetime')).toBe('2027-03-14')
    expect(day.get('time').classes()).toContain('whitespace-nowrap')
  })

  it('of an instant is the day in its time zone, not in the machine\'s', () => {
    const value = '2027-03-14T23:30:00Z'
    expect(plain(mountUi(UiDay, { props: { value, timeZone: 'Asia/Tokyo', withTime: true } }).text())).toBe('15 Mar 2027, 08:30')
    expect(plain(mountUi(UiDay, { props: { value, timeZone: 'America/Chicago' } }).text())).toBe('14 Mar 2027')
    expect(plain(mountUi(UiDay, { props: { value, withTime: true } }).text())).toBe('14 Mar 2027, 23:30 UTC')
  })

  it('takes its zone from the frame around it', () => {
    expect(plain(mountUi(UiDay, { props: { value: '2027-03-14T23:30:00Z' }, global: { provide: { [timeZoneKey as symbol]: 'Asia/Tokyo' } } }).text())).toBe('15 Mar 2027')
  })

  it('that is missing is said, not guessed', () => {
    expect(mountUi(UiDay, { props: { value: null, empty: 'never' } }).text()).toBe('never')
  })
})

describe('undo', () => {
  beforeEach(() => void vi.useFakeTimers())
  afterEach(() => void vi.useRealTimers())

  it('stands for ten seconds, then lets go', async () => {
    const undo = mountUi(UiUndo, { props: { message: 'Paper moved.' } })
    expect(undo.get('[role=status]').text()).toContain('Paper moved.')
    vi.advanceTimersByTime(9_000)
    expect(undo.emitted('done')).toBeUndefined()
    vi.advanceTimersByTime(1_000)
    expect(undo.emitted('done')).toHaveLength(1)
  })

  it('stands still while somebody is on it', async () => {
    const undo = mountUi(UiUndo, { props: { message: 'Paper moved.' } })
    await undo.get('.fixed').trigger('mouseenter')
    vi.advanceTimersByTime(60_000)
    expect(undo.emitted('done')).toBeUndefined()
    await undo.get('.fixed').trigger('mouseleave')
    vi.advanceTimersByTime(10_000)
    expect(undo.emitted('done')).toHaveLength(1)
  })

  it('takes it back once, and is not done afterwards', async () => {
    const undo = mountUi(UiUndo, { props: { message: 'Paper moved.' } })
    await undo.get('button').trigger('click')
    vi.advanceTimersByTime(20_000)
    expect(undo.emitted('undo')).toHaveLength(1)
    expect(undo.emitted('done')).toBeUndefined()
  })
})

describe('words and shapes', () => {
  it('a state is always a word beside its own shape', () => {
    const shapes = (['within', 'near', 'over', 'dormant', 'watch', 'active', 'unknown'] as const).map((tone) => {
      const state = mountUi(UiStateWord, { props: { word: tone, tone } })
      expect(state.text()).toBe(tone)
      return state.get('svg').html()
    })
    expect(new Set(shapes).size).toBe(7)
  })

  it('a verdict has one word, one number, one reason, one thing to do', () => {
    const verdict = mountUi(UiVerdict, { props: { word: 'Over', tone: 'over', says: ': joist 9 carries', number: '128 %', after: 'of its rating.', why: 'Three cartons stand at mid-span.', doNow: 'Move the paper to the north wall.', level: 2 } })
    expect(verdict.get('h2').text().replace(/\s+/g, ' ')).toBe('Over: joist 9 carries 128 % of its rating.')
    expect(verdict.text()).toContain('Three cartons stand at mid-span.')
    expect(verdict.text()).toContain('Move the paper to the north wall.')
  })

  it('a danger that appears is read out at once', () => {
    expect(mountUi(UiNotice, { props: { tone: 'danger', live: true } }).attributes('role')).toBe('alert')
    expect(mountUi(UiNotice, { props: { tone: 'calm', live: true } }).attributes('role')).toBe('status')
    expect(mountUi(UiNotice, { props: { tone: 'danger' } }).attributes('role')).toBe('note')
  })

  it('progress says in words where one stands', () => {
    const progress = mountUi(UiProgress, { props: { step: 2, of: 6 } })
    expect(progress.get('p').text()).toBe('Step 2 of 6')
    expect(progress.findAll('.bg-verdigris')).toHaveLength(2)
  })

  it('an empty place says what will stand there and offers the first step', () => {
    const empty = mountUi(UiEmpty, { props: { will: 'Marks will stand here.', step: 'Report a mark', to: '/report' } })
    expect(empty.text()).toContain('Marks will stand here.')
    expect(empty.getComponent(RouterLinkStub).props('to')).toBe('/report')
  })

  it('the title block is a list of facts, a missing one marked', () => {
    const block = mountUi(UiTitleBlock, { props: { facts: [{ label: 'Home', value: '14 Tern Street', main: true }, { label: 'Built', value: null }] } })
    expect(block.findAll('dt').map(dt => dt.text())).toEqual(['Home', 'Built'])
    expect(block.findAll('dd').map(dd => dd.text())).toEqual(['14 Tern Street', '—'])
  })

  it('the last step of the breadcrumb is the page itself', () => {
    const crumb = mountUi(UiBreadcrumb, { props: { trail: [{ label: 'Homes', to: '/homes' }, { label: 'Attic' }] } })
    expect(crumb.get('[aria-current=page]').text()).toBe('Attic')
  })

  it('a clash shows both versions and lets the person choose', async () => {
    const clash = mountUi(UiClash, { props: { rows: [{ field: 'name', label: 'Name', mine: 'Loft', theirs: 'Attic' }], who: 'Ada Example' } })
    expect(clash.text()).toContain('Ada Example changed this')
    expect(clash.findAll('tbody td').map(cell => cell.text())).toEqual(['Loft', 'Attic'])
    for (const button of clash.findAll('button')) await button.trigger('click')
    expect([clash.emitted('keepMine'), clash.emitted('takeTheirs')]).toEqual([[[]], [[]]])
  })
})

describe('the frame', () => {
  it('shows only what the person may open', () => {
    expect(frameEntries(['do job']).map(entry => entry.label)).toEqual(['Upkeep'])
    expect(frameEntries(['see portfolio', 'see finding', 'do job', 'manage people', 'see settings'])).toHaveLength(8)
    expect(frameEntries([])).toEqual([])
  })

  it('marks the room one is in, however deep', async () => {
    expect([isWithin('/homes/3/attic', '/homes'), isWithin('/homesick', '/homes'), isWithin('/homes', '/')]).toEqual([true, false, false])
    const bar = mountUi(FrameBar, { props: { entries: frameEntries(['see finding', 'see portfolio']), path: '/homes/3', account: { name: 'Ada Example', to: '/account' } } })
    await nextTick()
    expect(bar.get('nav [aria-current=page]').text()).toBe('Homes')
  })

  it('has kind words and a way on for every error', () => {
    for (const status of [401, 403, 404, 429, 500, 503, undefined]) {
      const words = wordsForError(status)
      expect(words.title.length).toBeGreaterThan(5)
      expect(`${words.title} ${words.text}`).not.toMatch(/!|error|invalid/i)
    }
    expect(wordsForError(503).again).toBe(true)
    expect(wordsForError(404).again).toBe(false)
  })
})

describe('the bar of a phone page', () => {
  it('goes a step back by an event, a page back by a link, else home', async () => {
    const bar = mountUi(PhoneBar, { props: { canGoBack: true, step: 2, of: 6, saved: 'Saved on this phone' } })
    await bar.get('button').trigger('click')
    expect(bar.emitted('back')).toHaveLength(1)
    expect(bar.get('[role=status]').text()).toBe('Saved on this phone')
    expect(bar.text()).toContain('Step 2 of 6')
    expect(mountUi(PhoneBar, { props: { backTo: '/units/3' } }).getComponent(RouterLinkStub).props('to')).toBe('/units/3')
    expect(mountUi(PhoneBar).getComponent(RouterLinkStub).props('to')).toBe('/')
  })
})

describe('a caution', () => {
  it('stands whole, word for word as it is kept in one place', () => {
    for (const code of Object.keys(safetyWords) as (keyof typeof safetyWords)[]) {
      const caution = mountUi(UiSafety, { props: { code } })
      for (const sentence of safetyWords[code].text) expect(caution.text()).toContain(sentence)
    }
    expect(mountUi(UiSafety, { props: { code: 'trusses' } }).text()).toContain(TRUSS_CAUTION)
    expect(mountUi(UiSafety, { props: { code: 'leave-room' } }).text()).toContain(LEAVE_ROOM_SIGNS)
  })
})
