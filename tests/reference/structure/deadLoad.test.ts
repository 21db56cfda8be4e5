import { describe, expect, it } from 'vitest'
import { CEILING_PSF, DEAD_PSF_WITHOUT_STORAGE, DEAD_PSF_WITH_STORAGE, DECK_PSF, INSULATION_PSF_PER_IN } from '../../../shared/utils/structure/deadLoadValues'
import { joistsPsf } from '../../../shared/utils/structure/deadLoad'
import { publishedTable } from './publishedTable'

const rows = publishedTable('dead-loads.csv')
const psf = (component: string): number => Number(rows.find(row => row.component === component)?.psf ?? Number.NaN)

describe('dead loads against published tables', () => {
  // Published: ASCE 7 Table C3.1-1.
  it.each([
    ['gypsum-half-inch', 'gypsum board 1/2 in'],
    ['gypsum-five-eighths', 'gypsum board 5/8 in'],
    ['plaster-on-lath', 'plaster on wood lath'],
  ] as const)('ceiling %s is "%s" of ASCE 7', (finish, component) => {
    expect(CEILING_PSF[finish].psf).toBe(psf(component))
  })

  // From memory: ASCE 7 Table C3.1-1, 3/4 in panels and 3/4 in subflooring.
  it('the deck and board ceilings are 3/4 in panels and 3/4 in boards of ASCE 7', () => {
    expect(DECK_PSF).toBe(psf('plywood/OSB 3/4 in'))
    expect(CEILING_PSF['wood-boards'].psf).toBe(psf('subflooring 3/4 in'))
  })

  // Published: a gypsum construction handbook (manufacturer); ASCE 7 for foam, from memory.
  it.each([
    ['fiberglass', 'fiberglass insulation, per in'],
    ['cellulose', 'cellulose or rock wool (old figure), per in'],
    ['rock-wool', 'cellulose or rock wool (old figure), per in'],
    ['foam-board', 'urethane foam with skin, per in'],
  ] as const)('insulation %s is "%s"', (material, component) => {
    expect(INSULATION_PSF_PER_IN[material].psf).toBe(psf(component))
  })

  // Published: 33 lb/ft3 lumber, dressed sizes at 16 in.
  it.each([['2x6', 5.5], ['2x8', 7.25], ['2x10', 9.25]] as const)('joists %s at 16 in weigh the published psf', (size, depthIn) => {
    expect(joistsPsf(1.5, depthIn, 16)).toBeCloseTo(psf(`joists ${size} at 16 in`), 1)
  })

  // Published: titles of IRC 2018 Tables R802.5.1(1) and (2).
  it('the allowances are those of the IRC span tables', () => {
    expect(DEAD_PSF_WITHOUT_STORAGE).toBe(psf('IRC span table allowance, no storage'))
    expect(DEAD_PSF_WITH_STORAGE).toBe(psf('IRC span table allowance, limited storage'))
  })
})
