import { z } from 'zod'
import type { CodeBasis } from '../types/attic'
import { longText, shortText, version } from './fields'

/** No building code asks more of an attic; a larger figure is another unit or a slip. Ours. */
const MOST_PSF = 100

const psf = z.number({ error: 'How many psf does it ask?' }).min(0, 'Not less than 0.').max(MOST_PSF, `That is more than ${MOST_PSF} psf. Is it in the right unit?`)

const Basis = z.strictObject({
  name: shortText('Which code or ordinance is it? Please name it.', 120),
  note: longText(1000),
  psf: z.strictObject({ 'habitable-or-fixed-stairs': psf, 'limited-storage': psf, 'no-storage': psf }),
}).superRefine(({ psf: of }, context) => {
  const issue = (path: keyof CodeBasis['psf'], message: string) => context.addIssue({ code: 'custom', path: ['psf', path], message })
  if (of['limited-storage'] < of['no-storage']) issue('limited-storage', 'Not less than an attic without storage.')
  if (of['habitable-or-fixed-stairs'] < of['limited-storage']) issue('habitable-or-fixed-stairs', 'Not less than an attic with limited storage.')
}) satisfies z.ZodType<CodeBasis>

/** Null: the code's own table. */
export const CodeBasisEdit = z.strictObject({ version, codeBasis: Basis.nullable() })
export type CodeBasisEditValue = z.infer<typeof CodeBasisEdit>
