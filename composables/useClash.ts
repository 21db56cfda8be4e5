import type { Form } from '~/composables/useForm'

interface ClashField<In> { field: keyof In & string, label: string, words?: (value: unknown) => string }

const plainWords = (value: unknown): string => {
  if (value === null || value === undefined || value === '') return ''
  if (typeof value === 'boolean') return value ? 'yes' : 'no'
  return Array.isArray(value) ? value.join(', ') : String(value)
}

/** The two versions of a form somebody else saved first, as UiClash shows them, and what to do with either. */
export function useClash<In extends { version: number }, A>(form: Form<In, A>, fields: readonly ClashField<In>[]) {
  const theirs = computed(() => form.clash.value?.theirs as (In & { version: number }) | undefined)
  const rows = computed(() => fields.map(({ field, label, words = plainWords }) => ({
    field, label, mine: words(form.values[field]), theirs: words(theirs.value?.[field]),
  })))
  return {
    rows,
    open: computed(() => theirs.value !== undefined),
    /** Mine goes over theirs: sent again against the version that stands. */
    keepMine: () => {
      if (theirs.value) form.values.version = theirs.value.version
      return form.submit()
    },
    takeTheirs: () => {
      const now = theirs.value
      if (!now) return
      const next = { ...form.values }
      for (const key of Object.keys(next) as (keyof In)[]) next[key] = now[key]
      form.reset(next)
    },
  }
}
