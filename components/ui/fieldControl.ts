import { computed, inject, useId } from 'vue'
import { fieldId, fieldKey } from './fieldContext'

/** Attributes that tie a control to the label, hint and error of the field around it. */
export function useFieldControl(props: { name?: string }) {
  const field = inject(fieldKey, null)
  const ownId = useId()
  return computed(() => ({
    'id': field?.id.value ?? (props.name ? fieldId(props.name) : ownId),
    'name': props.name ?? field?.name.value,
    'aria-describedby': field?.describedBy.value,
    'aria-invalid': field?.invalid.value ? ('true' as const) : undefined,
    'aria-required': field?.required.value ? ('true' as const) : undefined,
  }))
}
