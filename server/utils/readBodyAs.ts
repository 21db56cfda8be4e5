import type { H3Event } from 'h3'
import type { z } from 'zod'
import { readJson } from './apiRoute'
import { readInput } from './readInput'

/** For public routes: the JSON body held against its schema. */
export async function readBodyAs<S extends z.ZodType>(event: H3Event, schema: S): Promise<z.output<S>> {
  return readInput(schema, await readJson(event))
}
