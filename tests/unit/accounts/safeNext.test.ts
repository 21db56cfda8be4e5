import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { safeNext } from '../../../shared/utils/safeNext'

describe('the page after signing in', () => {
  it.each(['/units/01?tab=a#b', '/account', '/reports/x%20y'])('keeps a path of ours: %s', (next) => {
    expect(safeNext(next)).toBe(next)
  })

  it.each([
    ['another site', 'https://elsewhere.example/'],
    ['another site without a scheme', '//elsewhere.example/x'],
    ['a backslash browsers read as a slash', '/\\elsewhere.example'],
    ['a tab browsers leave out', '/\t/elsewhere.example'],
    ['a line break browsers leave out', '/\n/elsewhere.example'],
    ['dots that leave two slashes', '/x/..//elsewhere.example'],
    ['a script', 'javascript:alert(1)'],
    ['a path without its slash', 'account'],
    ['the sign-in page itself', '/sign-in?next=/sign-in'],
    ['a route that answers JSON', '/api/me'],
    ['nothing', undefined],
    ['several at once', ['/a', '/b']],
    ['something endless', `/${'a'.repeat(600)}`],
  ])('goes to the start for %s', (_, next) => {
    expect(safeNext(next)).toBe('/')
  })

  it('never leads to another origin, whatever it is given', () => {
    fc.assert(fc.property(fc.array(fc.constantFrom('/', '\\', '\t', '.', '..', ':', '@', 'a.example', 'http:', '?', '#', '%2f')), (parts) => {
      const next = safeNext(`/${parts.join('')}`)
      expect(new URL(next, 'https://ours.example').origin).toBe('https://ours.example')
    }))
  })
})
