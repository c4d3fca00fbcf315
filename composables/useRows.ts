import type { WatchSource } from 'vue'

interface Page<Item> { readonly items: readonly Item[], readonly next: string | null }
type RowQuery = Readonly<Record<string, string | number | undefined>>

const allPages = 100

/** A whole list, page after page, or its first `pages`; a page may be short and still have a next one. */
export function useRows<Item>(path: string, query: () => RowQuery = () => ({}), again: WatchSource[] = [], pages: () => number = () => allPages) {
  const api = useApi()
  const more = ref(false)
  const read = useRead<readonly Item[]>(async (signal) => {
    const rows: Item[] = []
    let cursor: string | undefined
    for (let page = 0; page < pages(); page += 1) {
      const answer = await api.get<Page<Item>>(path, { signal, query: { ...query(), limit: 200, cursor } })
      rows.push(...answer.items)
      more.value = answer.next !== null
      if (answer.next === null) break
      cursor = answer.next
    }
    return rows
  }, again)
  return { ...read, /** There are rows beyond the pages read. */ more }
}
