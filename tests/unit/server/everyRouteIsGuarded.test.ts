import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import ts from 'typescript'
import { describe, expect, it } from 'vitest'

const root = resolve(import.meta.dirname, '../../..')

/** Open to people who are not signed in, each for a reason. */
const PUBLIC: Record<string, string> = {
  'health.get.ts': 'asked by whatever keeps the server running',
  'auth/sign-up.post.ts': 'nobody has an account before it',
  'auth/beginnings/[token].get.ts': 'the link of the mail is the key',
  'auth/beginnings/[token].post.ts': 'the link of the mail is the key',
  'auth/sign-in.post.ts': 'makes the session',
  'auth/sign-out.post.ts': 'takes away a cookie, also of a session that has ended',
  'auth/forgotten-password.post.ts': 'for people who cannot sign in',
  'auth/reset-password/[token].get.ts': 'the link of the mail is the key',
  'auth/reset-password/[token].post.ts': 'the link of the mail is the key',
  'auth/invitations/[token].get.ts': 'the link of the mail is the key',
  'auth/invitations/[token].post.ts': 'the link of the mail is the key',
}

type Maker = 'apiRoute' | 'publicRoute' | undefined

/** Which wrapper of ours makes the default export, judged from the syntax and from where the name is imported. */
function makerOf(text: string): Maker {
  const source = ts.createSourceFile('route.ts', text, ts.ScriptTarget.Latest, true)
  const exported = source.statements.filter(ts.isExportAssignment)
  const call = exported.length === 1 ? exported[0]!.expression : undefined
  if (!call || !ts.isCallExpression(call) || !ts.isIdentifier(call.expression)) return undefined
  const name = call.expression.text
  const isOurs = source.statements.some(statement => ts.isImportDeclaration(statement)
    && ts.isStringLiteral(statement.moduleSpecifier) && /^(\.\.\/)+utils\/apiRoute$/.test(statement.moduleSpecifier.text)
    && statement.importClause?.namedBindings !== undefined && ts.isNamedImports(statement.importClause.namedBindings)
    && statement.importClause.namedBindings.elements.some(element => element.name.text === name && !element.propertyName))
  return isOurs && (name === 'apiRoute' || name === 'publicRoute') ? name : undefined
}

function filesIn(folder: string): string[] {
  if (!existsSync(join(root, folder))) return []
  return readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' }).filter(file => file.endsWith('.ts')).sort()
}

const routes = filesIn('server/api')

describe('every route under server/api', () => {
  it('is found at all', () => {
    expect(routes.length).toBeGreaterThan(10)
    expect(routes).toContain('me/index.get.ts')
  })

  it.each(routes)('%s is made by apiRoute, or is on the public list', (route) => {
    const made = makerOf(readFileSync(join(root, 'server/api', route), 'utf8'))
    expect(made).toBe(PUBLIC[route] === undefined ? 'apiRoute' : 'publicRoute')
  })

  it.each(Object.keys(PUBLIC))('the public list names no file that is gone: %s', (route) => {
    expect(existsSync(join(root, 'server/api', route))).toBe(true)
  })
})

describe('every route under server/routes', () => {
  const others = filesIn('server/routes')
  it.each(others.length > 0 ? others : ['(none)'])('%s admits its asker first', (route) => {
    if (route === '(none)') return expect(others).toEqual([])
    const text = readFileSync(join(root, 'server/routes', route), 'utf8')
    expect(makerOf(text) === 'apiRoute' || /\bawait admit\(/.test(text)).toBe(true)
  })
})

describe('the judge of routes itself', () => {
  it('passes a route made by the wrapper', () => {
    expect(makerOf('import { apiRoute } from \'../../utils/apiRoute\'\nexport default apiRoute({})')).toBe('apiRoute')
  })

  it.each([
    ['a bare handler', 'export default defineEventHandler(() => 1)'],
    ['a wrapper of the same name from elsewhere', 'import { apiRoute } from \'./mine\'\nexport default apiRoute({})'],
    ['another function under that name', 'import { publicRoute as apiRoute } from \'../../utils/apiRoute\'\nexport default apiRoute({})'],
    ['a wrapper that is called but not exported', 'import { apiRoute } from \'../utils/apiRoute\'\napiRoute({})\nexport default () => 1'],
    ['a wrapper inside something else', 'import { apiRoute } from \'../utils/apiRoute\'\nexport default other(apiRoute({}))'],
    ['no export', 'import { apiRoute } from \'../utils/apiRoute\'\napiRoute({})'],
  ])('refuses %s', (_, text) => {
    expect(makerOf(text)).toBeUndefined()
  })
})
