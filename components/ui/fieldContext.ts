import type { ComputedRef, InjectionKey } from 'vue'

/** What a field tells the control inside it. */
export interface FieldContext {
  id: ComputedRef<string>
  name: ComputedRef<string>
  describedBy: ComputedRef<string | undefined>
  invalid: ComputedRef<boolean>
  required: ComputedRef<boolean>
}

export const fieldKey: InjectionKey<FieldContext> = Symbol('field')

/** The error summary links to this id, so both sides must build it in one place. */
export function fieldId(name: string): string {
  return `field-${name.replace(/[^a-zA-Z0-9_-]+/g, '-')}`
}
