export interface FrameEntry { label: string, to: string }

/** The rooms of the staff frame, each with the ability that opens it. */
const entries: readonly (FrameEntry & { needs: string })[] = [
  { label: 'Overview', to: '/overview', needs: 'see portfolio' },
  { label: 'Findings', to: '/findings', needs: 'see finding' },
  { label: 'Homes', to: '/homes', needs: 'see finding' },
  { label: 'Attics', to: '/attics', needs: 'see finding' },
  { label: 'Ceilings', to: '/ceilings', needs: 'see finding' },
  { label: 'Upkeep', to: '/upkeep', needs: 'do job' },
  { label: 'People', to: '/people', needs: 'manage people' },
  { label: 'Settings', to: '/settings', needs: 'see settings' },
]

export function frameEntries(abilities: readonly string[]): FrameEntry[] {
  return entries.filter(entry => abilities.includes(entry.needs)).map(({ label, to }) => ({ label, to }))
}

/** Is the page at this path inside that entry? */
export function isWithin(path: string, to: string): boolean {
  return to === '/' ? path === '/' : path === to || path.startsWith(`${to}/`)
}
