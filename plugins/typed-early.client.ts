type Control = HTMLInputElement | HTMLTextAreaElement | HTMLSelectElement

/**
 * A page can be typed into before its script has come over a slow line; bringing it to life writes the empty model over
 * what was typed, and leaves ticks that no model knows. What was entered until then is entered again afterwards.
 */
export default defineNuxtPlugin((nuxtApp) => {
  if (!nuxtApp.isHydrating) return
  const early = new Map<Control, string | boolean>()
  const note = (control: Control) => early.set(control, stateOf(control))
  for (const control of document.querySelectorAll<Control>('input, textarea, select')) if (isTouched(control)) note(control)
  const listen = (event: Event) => note(event.target as Control)
  document.addEventListener('input', listen, true)
  nuxtApp.hooks.hookOnce('app:suspense:resolve', () => {
    document.removeEventListener('input', listen, true)
    for (const [control, state] of early) if (control.isConnected) enter(control, state)
  })
})

const isTick = (control: Control): control is HTMLInputElement => control.type === 'checkbox' || control.type === 'radio'
const stateOf = (control: Control) => isTick(control) ? control.checked : control.value

function isTouched(control: Control): boolean {
  if (isTick(control)) return control.checked !== control.defaultChecked
  if (control instanceof HTMLSelectElement) return [...control.options].some(option => option.selected && !option.defaultSelected && option.index > 0)
  return control.value !== control.defaultValue
}

function enter(control: Control, state: string | boolean) {
  if (isTick(control)) control.checked = state === true
  else control.value = String(state)
  // Of a set of radios only the one that is ticked speaks for it.
  if (control.type === 'radio' && state !== true) return
  for (const name of ['input', 'change']) control.dispatchEvent(new Event(name, { bubbles: true }))
}
