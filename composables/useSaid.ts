/** One sentence carried over a change of page: what was just done, said where it shows. */
export const useSaid = (about: string) => useState<string>(`said ${about}`, () => '')
