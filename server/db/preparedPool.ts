import type { PostgresCursor, PostgresPool, PostgresPoolClient, PostgresQueryResult } from 'kysely'
import type pg from 'pg'

/** Ours: a connection keeps the plans of so many statements; what comes later (lists of every length) is planned each time. */
export const MOST_PREPARED = 400

const PREPARABLE = /^\s*(?:select|with|insert|update|delete)\b/i
/** "cached plan must not change result type": a migration changed a table under a running server. */
const PLAN_OUTDATED = '0A000'

/** One name a text for the whole process, so that a name means the same on every connection. */
class StatementNames {
  #names = new Map<string, string>()
  #generation = 0

  nameOf(text: string): string | undefined {
    const known = this.#names.get(text)
    if (known || this.#names.size >= MOST_PREPARED || !PREPARABLE.test(text)) return known
    const name = `lathkey_${this.#generation}_${this.#names.size}`
    this.#names.set(text, name)
    return name
  }

  forget() {
    this.#names.clear()
    this.#generation += 1
  }
}

class PreparingClient implements PostgresPoolClient {
  constructor(private readonly client: pg.PoolClient, private readonly names: StatementNames) {}

  query<R>(text: string, parameters: readonly unknown[]): Promise<PostgresQueryResult<R>>
  query<R>(cursor: PostgresCursor<R>): PostgresCursor<R>
  query<R>(statement: string | PostgresCursor<R>, parameters: readonly unknown[] = []): Promise<PostgresQueryResult<R>> | PostgresCursor<R> {
    if (typeof statement !== 'string') throw new TypeError('Cursors are not read through this pool.')
    return this.#run(statement, [...parameters]) as Promise<PostgresQueryResult<R>>
  }

  async #run(text: string, values: unknown[]): Promise<unknown> {
    const name = this.names.nameOf(text)
    if (!name) return this.client.query(text, values)
    try { return await this.client.query({ name, text, values }) }
    catch (error) {
      if ((error as { code?: string }).code !== PLAN_OUTDATED) throw error
      this.names.forget()
      return this.client.query(text, values)
    }
  }

  release(destroy?: boolean) {
    this.client.release(destroy)
  }
}

/**
 * A pool whose connections prepare each statement once: planning the longer ones takes the database longer than running them.
 * A pooler between us and the database must carry prepared statements (PgBouncer from 1.21 does).
 */
export function preparedPool(pool: pg.Pool): PostgresPool {
  const names = new StatementNames()
  const clients = new WeakMap<pg.PoolClient, PreparingClient>()
  return {
    async connect() {
      const client = await pool.connect()
      const known = clients.get(client) ?? new PreparingClient(client, names)
      clients.set(client, known)
      return known
    },
    end: () => pool.end(),
  }
}
