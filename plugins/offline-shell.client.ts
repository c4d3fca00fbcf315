/*
 * Swap pages open again without reception once the browser has kept what they are made of. Browsers allow that over https and
 * on the machine itself; over plain http a swap page that is open stays, and only a reload wants reception. Registered where a
 * swap is looked at, so that a desk loads nothing for it.
 */
export default defineNuxtPlugin({
  name: 'offline-shell',
  setup() {
    if (import.meta.dev || !('serviceWorker' in navigator)) return
    let asked = false
    useRouter().afterEach(async ({ path }) => {
      if (asked || !/^\/swaps(\/|$)/.test(path)) return
      asked = true
      try {
        await navigator.serviceWorker.register('/service-worker.js', { scope: '/swaps' })
      }
      catch (failure) {
        // Blocked by the browser's settings, or no reception this very moment: the next swap page asks again.
        asked = false
        console.warn('The swap pages are not kept for a reload without reception.', failure)
      }
    })
  },
})
