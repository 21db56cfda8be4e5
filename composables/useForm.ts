import { computed, reactive, ref, toRaw, type ComputedRef, type Ref } from 'vue'
import { messageForIssue, type FormIssue } from './formIssue'
import { readProblem, type FormProblem } from './formProblem'

/** The part of a zod schema a form needs; the schema itself is loaded on the first submit. */
export interface FormSchema<Out> {
  safeParse: (input: unknown) => { success: true, data: Out } | { success: false, error: { issues: readonly FormIssue[] } }
}

export interface FormOptions<In extends object, Out, Answer> {
  initial: In
  /** `() => import('~/shared/schemas/x').then(m => m.XInput)`. Without it the values go to submit as they are. */
  schema?: () => Promise<FormSchema<Out>>
  submit: (value: Out) => Promise<Answer>
}

export interface FormSummary {
  message: string | undefined
  items: { field: string, message: string }[]
}

export interface Form<In extends object, Answer> {
  values: In
  /** Field name → what is wrong. Nested fields are named with dots: 'joists.0.spanFt'. */
  errors: Record<string, string>
  summary: ComputedRef<FormSummary>
  problem: Ref<FormProblem | null>
  busy: Ref<boolean>
  /** Set when the server holds a newer version: theirs, as the answer sent it. */
  clash: Ref<{ theirs: unknown } | null>
  dirty: ComputedRef<boolean>
  /** The answer of the server, or undefined when something was refused: then errors and summary say what. */
  submit: () => Promise<Answer | undefined>
  reset: (to?: In) => void
}

/** What is wrong with the answers together, not with one of them: the routes use the same name. */
const wholeForm = 'form'

export function useForm<In extends object, Out = In, Answer = unknown>(options: FormOptions<In, Out, Answer>): Form<In, Answer> {
  const start = ref(JSON.stringify(options.initial))
  const values = reactive(plainCopy(options.initial)) as In
  const errors = reactive<Record<string, string>>({})
  const problem = ref<FormProblem | null>(null)
  const clash = ref<{ theirs: unknown } | null>(null)
  const busy = ref(false)

  function clear() {
    for (const field of Object.keys(errors)) Reflect.deleteProperty(errors, field)
    problem.value = null
    clash.value = null
  }

  async function submit(): Promise<Answer | undefined> {
    if (busy.value) return undefined
    busy.value = true
    clear()
    try {
      const checked = await check(options.schema, values)
      if (!checked.success) {
        Object.assign(errors, fieldErrors(checked.error.issues))
        return undefined
      }
      const answer = await options.submit(checked.data)
      start.value = JSON.stringify(values)
      return answer
    }
    catch (error) {
      problem.value = readProblem(error)
      Object.assign(errors, problem.value.fields)
      if (problem.value.status === 409 && problem.value.theirs !== undefined) clash.value = { theirs: problem.value.theirs }
      return undefined
    }
    finally {
      busy.value = false
    }
  }

  function reset(to?: In) {
    clear()
    if (to) start.value = JSON.stringify(to)
    Object.assign(values, JSON.parse(start.value) as In)
  }

  return {
    values, errors, problem, busy, clash, submit, reset,
    summary: computed(() => ({
      message: errors[wholeForm] ?? problem.value?.message,
      items: Object.entries(errors).filter(([field]) => field !== wholeForm).map(([field, message]) => ({ field, message })),
    })),
    dirty: computed(() => JSON.stringify(values) !== start.value),
  }
}

/** A deep copy free of Vue's proxies; files, days and other class instances are kept as they are. */
export function plainCopy<T>(value: T): T {
  const raw: unknown = toRaw(value)
  if (Array.isArray(raw)) return raw.map(plainCopy) as T
  if (raw === null || typeof raw !== 'object' || Object.getPrototypeOf(raw) !== Object.prototype) return raw as T
  return Object.fromEntries(Object.entries(raw).map(([key, inner]) => [key, plainCopy<unknown>(inner)])) as T
}

async function check<Out>(schema: FormOptions<object, Out, unknown>['schema'], values: object) {
  const input = plainCopy(values)
  return schema ? (await schema()).safeParse(input) : { success: true as const, data: input as Out }
}

/** The first thing wrong with each field; one is enough to act on. */
function fieldErrors(issues: readonly FormIssue[]): Record<string, string> {
  const found: Record<string, string> = {}
  for (const issue of issues) {
    const field = issue.path.map(String).join('.') || wholeForm
    found[field] ??= messageForIssue(issue)
  }
  return found
}
