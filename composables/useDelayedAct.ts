import { onBeforeUnmount, onMounted, shallowRef, ref } from 'vue'
import { readProblem } from '~/composables/formProblem'

interface DelayedAct<T> {
  send: (thing: T) => Promise<unknown>
  /** The same as an address and a body, for a page that is closing. */
  request: (thing: T) => { path: string, body: object }
  /** What was not done, when the server refuses. */
  refused: (thing: T) => string
}

/** An act that is done only when the time to change one's mind has passed, or when the page is left. One at a time. */
export function useDelayedAct<T extends { id: string }>({ send, request, refused }: DelayedAct<T>) {
  const pending = shallowRef<T | null>(null)
  const trouble = ref('')

  async function finish() {
    const thing = pending.value
    if (!thing) return
    trouble.value = ''
    try { await send(thing) }
    catch (error) { trouble.value = `${refused(thing)} ${readProblem(error).message}` }
    if (pending.value?.id === thing.id) pending.value = null
  }
  async function start(thing: T) {
    if (pending.value) await finish()
    pending.value = thing
  }
  function undo() {
    pending.value = null
  }
  /** A closing tab waits for nobody: the browser sends this on its own. */
  function finishOnClosing() {
    const thing = pending.value
    if (!thing) return
    pending.value = null
    const { path, body } = request(thing)
    void fetch(path, { method: 'POST', keepalive: true, headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) })
  }
  onMounted(() => window.addEventListener('pagehide', finishOnClosing))
  onBeforeUnmount(() => {
    window.removeEventListener('pagehide', finishOnClosing)
    void finish()
  })
  return { pending, trouble, start, undo, finish }
}
