import { v7 } from 'uuid'
import { now } from './clock'

/** UUIDv7 everywhere: sorts by the time it was made, cannot be guessed. */
export const newId = () => v7({ msecs: now().getTime() })

const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[1-8][0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/i
export const isId = (text: unknown): text is string => typeof text === 'string' && UUID.test(text)
