import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { useForm, type FormSchema } from '../../../composables/useForm'

const AtticInput = z.object({ name: z.string().min(1), spanFt: z.number().positive(), joists: z.array(z.object({ depthIn: z.number().min(3) })) })
type AtticInput = z.infer<typeof AtticInput>
const schema = async (): Promise<FormSchema<AtticInput>> => AtticInput

const refusal = (statusCode: number, data: object, message = 'Refused.') =>
  Object.assign(new Error('FetchError'), { statusCode, data: { statusCode, message, data } })

function form(submit: (value: AtticInput) => Promise<string> = async () => 'saved', initial = { name: 'Loft', spanFt: 14 as number | null, joists: [{ depthIn: 5.5 }] }) {
  return useForm<typeof initial, AtticInput, string>({ initial, schema, submit })
}

describe('useForm', () => {
  it('gives the checked value to submit and yields its answer', async () => {
    const sent: AtticInput[] = []
    const f = form(async (value) => {
      sent.push(value)
      return 'saved'
    })
    expect(await f.submit()).toBe('saved')
    expect(sent).toEqual([{ name: 'Loft', spanFt: 14, joists: [{ depthIn: 5.5 }] }])
    expect(f.errors).toEqual({})
  })

  it('does not load the schema before the first submit', async () => {
    let loads = 0
    const f = useForm({ initial: { name: 'x' }, schema: async () => {
      loads++
      return z.object({ name: z.string() })
    }, submit: async () => 1 })
    expect(loads).toBe(0)
    await f.submit()
    expect(loads).toBe(1)
  })

  it('names each refused field by its dotted path, in plain words, and sends nothing', async () => {
    let sent = 0
    const f = form(async () => String(sent++), { name: '', spanFt: null, joists: [{ depthIn: 1 }] })
    expect(await f.submit()).toBeUndefined()
    expect(f.errors).toEqual({ 'name': 'Please fill this in.', 'spanFt': 'Please fill this in.', 'joists.0.depthIn': 'Use 3 or more.' })
    expect(f.summary.value.items.map(item => item.field)).toEqual(['name', 'spanFt', 'joists.0.depthIn'])
    expect(sent).toBe(0)
  })

  it('tells "not a number" from "not filled in"', async () => {
    const f = form(undefined, { name: 'Loft', spanFt: Number.NaN, joists: [] })
    await f.submit()
    expect(f.errors.spanFt).toBe('Write this as a number, such as 12.5.')
  })

  it('keeps a sentence that the schema itself wrote', async () => {
    const f = useForm({ initial: { age: 3 }, schema: async () => z.object({ age: z.number().max(2, 'Two years at most.') }), submit: async () => 1 })
    await f.submit()
    expect(f.errors.age).toBe('Two years at most.')
  })

  it('maps the fields of a 422 and keeps everything typed', async () => {
    const f = form(async () => {
      throw refusal(422, { code: 'unsound-input', fields: { name: 'This name is taken.' } }, 'One field needs another look.')
    })
    f.values.name = 'Attic over the hall'
    expect(await f.submit()).toBeUndefined()
    expect(f.errors).toEqual({ name: 'This name is taken.' })
    expect(f.summary.value.message).toBe('One field needs another look.')
    expect(f.values.name).toBe('Attic over the hall')
    expect(f.busy.value).toBe(false)
  })

  it('holds both versions of a 409', async () => {
    const f = form(async () => {
      throw refusal(409, { code: 'clash', theirs: { name: 'Theirs', version: 4 } })
    })
    await f.submit()
    expect(f.clash.value).toEqual({ theirs: { name: 'Theirs', version: 4 } })
    expect(f.values.name).toBe('Loft')
  })

  it('has kind words when the server cannot be reached or answers without a code', async () => {
    for (const [thrown, words] of [
      [new TypeError('fetch failed'), /could not reach/],
      [refusal(503, {}, 'Internal detail'), /not available just now/],
      [refusal(500, {}, 'stack trace'), /on our side/],
      [refusal(503, { code: 'database-away' }, 'The database cannot be reached just now.'), /database cannot be reached/],
      [refusal(429, {}), /Wait a little/],
    ] as const) {
      const f = form(async () => {
        throw thrown
      })
      await f.submit()
      expect(f.summary.value.message).toMatch(words)
    }
  })

  it('reads how long to wait from Retry-After', async () => {
    const f = form(async () => {
      throw Object.assign(refusal(429, { code: 'too-many' }), { response: { headers: new Headers({ 'retry-after': '30' }) } })
    })
    await f.submit()
    expect(f.problem.value?.retryAfterS).toBe(30)
  })

  it('says what is wrong with the answers together on top, not at a field', async () => {
    const f = useForm({ initial: { from: 2, to: 1 }, schema: async () => z.object({ from: z.number(), to: z.number() }).refine(v => v.from < v.to, 'The end comes before the start.'), submit: async () => 1 })
    await f.submit()
    expect(f.summary.value).toEqual({ message: 'The end comes before the start.', items: [] })
  })

  it('never shows the schema library\'s own English when a route passes it on', async () => {
    const f = form(async () => {
      throw refusal(422, { code: 'unsound-input', fields: { name: 'Invalid input: expected string, received undefined' } })
    })
    await f.submit()
    expect(f.errors.name).toBe('Please look at this again.')
  })

  it('clears old errors on the next try, and is dirty until saved', async () => {
    const f = form()
    expect(f.dirty.value).toBe(false)
    f.values.name = ''
    expect(f.dirty.value).toBe(true)
    await f.submit()
    expect(Object.keys(f.errors)).toEqual(['name'])
    f.values.name = 'Loft 2'
    await f.submit()
    expect(f.errors).toEqual({})
    expect(f.dirty.value).toBe(false)
  })

  it('takes one submit at a time', async () => {
    let runs = 0
    const f = form(async () => {
      runs++
      await new Promise(resolve => setTimeout(resolve, 5))
      return 'saved'
    })
    await Promise.all([f.submit(), f.submit()])
    expect(runs).toBe(1)
  })

  it('goes back to where it started, nested values and all', () => {
    const f = form()
    f.values.joists[0]!.depthIn = 9
    f.reset()
    expect(f.values.joists).toEqual([{ depthIn: 5.5 }])
    expect(f.dirty.value).toBe(false)
  })
})
