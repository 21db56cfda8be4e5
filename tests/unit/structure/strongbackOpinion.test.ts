import { describe, expect, it } from 'vitest'
import { judgeContents } from '../../../shared/utils/attic/judgeContents'
import { strongbackOpinion } from '../../../shared/utils/structure/strongbackOpinion'
import { item } from '../attic/attics'
import { joistField, paper, survey } from './surveys'

const letter = paper({ acceptsStrongbacks: true, writtenOn: '2026-04-01', writtenBy: 'Edda Invented' })
const surveyedOn = '2026-03-14'

describe('an engineer\'s opinion on strongbacks', () => {
  it('counts when it is a letter on file for the whole attic, not older than the survey', () => {
    expect(strongbackOpinion([letter], surveyedOn)).toEqual({ kind: 'accepted', writtenOn: '2026-04-01', writtenBy: 'Edda Invented' })
    expect(strongbackOpinion([letter], '2026-04-01').kind).toBe('accepted')
  })

  it.each([
    ['no paper', [], 'none'],
    ['a letter that does not speak of them', [paper()], 'none'],
    ['an inspection record', [paper({ kind: 'inspection-record', acceptsStrongbacks: true })], 'none'],
  ] as const)('%s: none', (_name, papers, kind) => {
    expect(strongbackOpinion(papers, surveyedOn).kind).toBe(kind)
  })

  it.each([
    ['not attached', { attached: false }, 'not-attached'], ['for a part', { coversWholeAttic: false }, 'covers-part'], ['written before the survey', { writtenOn: '2026-03-13' }, 'before-survey'],
  ] as const)('a letter %s does not count, and says why', (_name, change, why) => {
    expect(strongbackOpinion([paper({ ...letter, ...change })], surveyedOn)).toMatchObject({ kind: 'does-not-count', why })
  })

  it('lets a sound strongback count in the verdict, and only a sound one', () => {
    const judged = (sound: boolean | null, papers = [letter]) => {
      const strongbacks = [{ atFt: 6, size: '2x6' as const, breadthIn: null, depthIn: null, sound, engineerAccepts: false }]
      const contents = judgeContents({ survey: survey({ joistFields: [joistField({ strongbacks })] }), documents: papers, items: [item({ xFt: 5, yFt: 8, quantity: 3 })] })
      const [field] = contents.fields
      return field?.plan?.kind === 'judged' ? { counts: field.plan.strongbacksCount, utilisation: field.plan.joists[field.plan.worstJoist]!.utilisation } : expect.fail('no plan')
    }
    expect([judged(true).counts, judged(true, []).counts, judged(null).counts, judged(false).counts]).toEqual([true, false, false, false])
    expect(judged(true).utilisation).toBeLessThan(judged(true, []).utilisation)
  })
})
