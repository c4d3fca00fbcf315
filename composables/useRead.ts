import type { WatchSource } from 'vue'

/**
 * Reads once at the start and again when a source changes or `reload` is called. What was read last stays when a later
 * read fails, so a page keeps its rows and says as of when; the newest read wins.
 */
export function useRead<Answer>(read: (signal: AbortSignal) => Promise<Answer>, again: WatchSource[] = []) {
  const data = shallowRef<Answer>()
  const problem = shallowRef<ApiProblem>()
  const loading = ref(true)
  const readAt = ref<string>()
  let running: AbortController | undefined

  async function reload(): Promise<void> {
    running?.abort()
    const mine = running = new AbortController()
    loading.value = true
    try {
      const answer = await read(mine.signal)
      if (mine.signal.aborted) return
      data.value = answer
      problem.value = undefined
      readAt.value = new Date().toISOString()
    }
    catch (failure) {
      if (mine.signal.aborted) return
      problem.value = toProblem(failure)
    }
    loading.value = false
  }

  watch(again, reload)
  onScopeDispose(() => running?.abort())
  void reload()
  return { data, problem, loading, readAt, reload }
}
