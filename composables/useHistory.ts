import type { HistoryItem } from '#shared/api/history'

interface HistoryPage { readonly items: HistoryItem[], readonly next: string | null }

/** Changes that a question asks for, newest first, two hundred at a time; begins anew when the question changes. */
export function useHistory(query: () => Record<string, string>, asked: () => boolean) {
  const api = useApi()
  const items = shallowRef<readonly HistoryItem[]>([])
  const next = ref<string | null>(null)
  const problem = shallowRef<ApiProblem>()
  const loading = ref(false)
  const readAt = ref<string>()
  let running: AbortController | undefined

  async function read(cursor: string | null): Promise<void> {
    running?.abort()
    const mine = running = new AbortController()
    loading.value = true
    try {
      // A page may be empty and still have a next one: it is gone through until something is found.
      let page: HistoryPage = { items: [], next: cursor }
      do page = await api.get<HistoryPage>('/api/history', { signal: mine.signal, query: { ...query(), limit: 200, ...(page.next !== null && { cursor: page.next }) } })
      while (page.items.length === 0 && page.next !== null)
      if (mine.signal.aborted) return
      items.value = cursor === null ? page.items : [...items.value, ...page.items]
      next.value = page.next
      problem.value = undefined
      readAt.value = new Date().toISOString()
    }
    catch (failure) {
      if (mine.signal.aborted) return
      problem.value = toProblem(failure)
    }
    loading.value = false
  }

  function begin(): void {
    items.value = []
    next.value = null
    problem.value = undefined
    if (asked()) void read(null)
  }
  watch(() => JSON.stringify([query(), asked()]), begin, { immediate: true })
  onScopeDispose(() => running?.abort())
  return { items, problem, loading, readAt, begin, more: computed(() => next.value !== null), loadMore: () => (loading.value || next.value === null ? undefined : read(next.value)) }
}
