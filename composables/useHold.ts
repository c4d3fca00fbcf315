import { usePreferredReducedMotion, useRafFn } from '@vueuse/core'

/** How long a press must last, in ms; a second press counts from `again` on, so that a finger that trembles does not confirm. */
const hold = { lasts: 1000, again: 500, forgets: 8000 }

/**
 * Confirms what is held for a second, by pointer or space bar, or pressed twice. `share` is how much of it has passed, 0 to 1;
 * with reduced motion it stays 0 until it is done. `armed`: pressed once, waits for the second press.
 */
export function useHold(done: () => void) {
  const share = ref(0)
  const armed = ref(false)
  const still = usePreferredReducedMotion()
  let began: number | undefined
  let armedAt = 0
  /** A hold that confirmed is followed by the click of its release: that is no press of its own. */
  let confirmed = false

  const { pause, resume } = useRafFn(() => {
    if (began === undefined) return
    const passed = Math.min(1, (performance.now() - began) / hold.lasts)
    share.value = still.value === 'reduce' && passed < 1 ? 0 : passed
    if (passed === 1) confirm()
  }, { immediate: false })
  const forget = useTimeoutFn(() => { armed.value = false }, hold.forgets, { immediate: false })

  function confirm(): void {
    pause()
    began = undefined
    confirmed = true
    armed.value = false
    share.value = 1
    if ('vibrate' in navigator) navigator.vibrate(40)
    done()
  }

  function begin(): void {
    if (began !== undefined) return
    confirmed = false
    began = performance.now()
    resume()
  }

  function release(): void {
    pause()
    began = undefined
    if (!confirmed) share.value = 0
  }

  function press(): void {
    if (confirmed) {
      confirmed = false
      return
    }
    const now = performance.now()
    if (armed.value && now - armedAt >= hold.again) return confirm()
    if (armed.value) return
    armed.value = true
    armedAt = now
    forget.start()
  }

  /** The button stands again as it was: what was confirmed was not taken. */
  function reset(): void {
    share.value = 0
    armed.value = false
    confirmed = false
  }

  return { share, armed, begin, release, press, reset }
}
