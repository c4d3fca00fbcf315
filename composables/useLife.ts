import type { LifeEvent } from '#shared/api/versions'

interface LifePage { readonly items: LifeEvent[], readonly next: string | null }

/** What happened to an axis, newest first, two hundred events at a time; begins anew when the tag changes. */
export function useLife(tag: () => string) {
  const api = useApi()
  const events = shallowRef<readonly LifeEvent[]>([])
  const next = ref<string | null>(null)
  const problem = shallowRef<ApiProblem>()
  const loading = ref(false)

  async function loadMore(): Promise<void> {
    loading.value = true
    try {
      const page = await api.get<LifePage>(`/api/axes/tag:${tag()}/life`, { query: { limit: 200, ...(next.value !== null && { cursor: next.value }) } })
      events.value = [...events.value, ...page.items]
      next.value = page.next
      problem.value = undefined
    }
    catch (failure) {
      problem.value = toProblem(failure)
    }
    loading.value = false
  }

  function begin(): void {
    events.value = []
    next.value = null
    void loadMore()
  }
  watch(tag, begin, { immediate: true })
  return { events, problem, loading, loadMore, begin, more: computed(() => next.value !== null) }
}
