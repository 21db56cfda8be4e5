import type { Compilable, CompiledQuery } from 'kysely'
import type { Db } from './connect'

/** Stands for an argument while a statement is compiled. */
class Slot {
  constructor(readonly name: string) {}
}

/** Looks like the arguments; whatever is done to one but passing it on as a value fails at the first use. */
function slotsFor<G>(): G {
  return new Proxy({}, { get: (_, name) => new Slot(String(name)) }) as G
}

/**
 * A statement that Kysely builds once: for the longer ones building takes most of a request's time.
 * `build` may use each of `given` only as a value in the statement; what changes the statement's shape comes in `shape`.
 */
export function compiledOnce<G extends object, R, S = undefined>(build: (db: Db, given: G, shape: S) => Compilable<R>) {
  const compiled = new Map<string, CompiledQuery<R>>()

  function statementFor(db: Db, shape: S): CompiledQuery<R> {
    const key = JSON.stringify(shape) ?? ''
    const known = compiled.get(key) ?? build(db, slotsFor<G>(), shape).compile()
    compiled.set(key, known)
    return known
  }

  async function rows(db: Db, given: G, ...[shape]: S extends undefined ? [] : [shape: S]): Promise<R[]> {
    const statement = statementFor(db, shape as S)
    const parameters = statement.parameters.map(value => value instanceof Slot ? given[value.name as keyof G] : value)
    return (await db.executeQuery<R>({ ...statement, parameters })).rows
  }

  return { rows, first: async (...given: Parameters<typeof rows>): Promise<R | undefined> => (await rows(...given))[0] }
}
