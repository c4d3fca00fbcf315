import type { TrailSource } from '~/utils/trail/prove'

/** The figures that the trail page reckons with, as the server hands them over. */
export function useTrailSource(): TrailSource {
  const api = useApi()
  return {
    checkpoint: async () => (await api.file('/api/log/checkpoint')).text(),
    consistency: (from, to) => api.get('/api/log/consistency', { query: { from, to } }),
    proof: (entry, size) => api.get('/api/log/proof', { query: { entry, size } }),
    entries: async (from) => {
      const { items } = await api.get<{ items: { seq: number, leaf: string }[] }>('/api/log', { query: { limit: 200, ...(from > 0 ? { cursor: String(from - 1) } : {}) } })
      return items
    },
  }
}
