/** Ours: how often what waits for a signal is tried again while the page is open. */
const TRY_AGAIN_MS = 15_000

/** Tries again when the signal is back, when the page is looked at again, and every now and then while something waits. */
export function useTryAgain(isWaiting: () => boolean, tryAgain: () => void) {
  const comeBack = () => document.visibilityState === 'visible' && tryAgain()
  let timer: ReturnType<typeof setInterval> | undefined
  onMounted(() => {
    window.addEventListener('online', tryAgain)
    document.addEventListener('visibilitychange', comeBack)
    timer = setInterval(() => isWaiting() && tryAgain(), TRY_AGAIN_MS)
  })
  onBeforeUnmount(() => {
    window.removeEventListener('online', tryAgain)
    document.removeEventListener('visibilitychange', comeBack)
    clearInterval(timer)
  })
}
