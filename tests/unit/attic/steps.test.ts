import { describe, expect, it } from 'vitest'
import { ADVICE_CODES, type AdviceCode } from '../../../shared/types/finding'
import { dueAddress, nextStep } from '../../../shared/utils/messages/nextStep'
import { DUE_KINDS } from '../../../shared/utils/upkeep/dueItems'

const at = (subjectKind: 'attic' | 'mark' | 'job' | 'unit') => ({ subjectKind, subjectId: 'S', unitId: 'U', findingId: 'F' })
/** The addresses that exist: see pages/. */
const PAGES = [/^\/attics\/S(\/(load-plan|survey))?$/, /^\/units\/U$/, /^\/marks\/S(\/reading)?$/, /^\/findings\/[FS]$/, /^\/jobs\/S$/, /^\/jobs\/new\?unit=U&finding=F$/, /^\/upkeep$/, /^\/people$/]

describe('the next step of a finding', () => {
  it.each(ADVICE_CODES.flatMap(code => (['attic', 'mark', 'job', 'unit'] as const).map(kind => [code, kind] as const)))('for %s about one %s has words and a page that exists', (code, kind) => {
    const { label, to } = nextStep(code, at(kind))
    expect(label.length).toBeGreaterThan(5)
    expect(PAGES.some(page => page.test(to)), to).toBe(true)
    if (to.startsWith('/attics/')) expect(kind).toBe('attic')
    if (to.startsWith('/marks/')) expect(kind).toBe('mark')
  })

  it.each<[AdviceCode, 'attic' | 'mark', string]>([
    ['stop-adding-and-unload', 'attic', '/attics/S/load-plan'], ['survey-attic', 'attic', '/attics/S/survey'], ['confirm-inventory', 'attic', '/attics/S'],
    ['take-reading', 'mark', '/marks/S/reading'], ['leave-room-and-call', 'mark', '/marks/S'],
  ])('%s leads to where it can be done', (code, kind, to) => {
    expect(nextStep(code, at(kind)).to).toBe(to)
  })
})

describe('where what is due can be done', () => {
  it.each(DUE_KINDS)('%s has a page that exists', (kind) => {
    expect(PAGES.some(page => page.test(dueAddress(kind, 'S'))), dueAddress(kind, 'S')).toBe(true)
  })
})
