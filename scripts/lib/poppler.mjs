import { findProgram, installDebianPackages, mayInstall } from './debianPackages.mjs'
import { Refusal } from './refusal.mjs'

/** The printed papers are rendered and read back with pdftoppm and pdftotext. */
const PROGRAMS = ['pdftoppm', 'pdftotext', 'pdfinfo']
const areThere = () => PROGRAMS.every(name => findProgram(name))

/** @param {{ keeper: ReturnType<typeof import('./keeper.mjs').createKeeper>, say: (line: string) => void }} options */
export async function ensurePoppler({ keeper, say }) {
  if (areThere()) return
  if (!mayInstall()) throw new Refusal('The tests of printed papers need pdftoppm, pdftotext and pdfinfo. Install them with "sudo apt-get install poppler-utils" (Debian).')
  await installDebianPackages({ packages: ['poppler-utils'], keeper, say })
  if (!areThere()) throw new Refusal(`The package poppler-utils was installed, but ${PROGRAMS.join(', ')} are not all there.`)
}
