import type { LetterKind, OwnLetters, Watch, WatchScope } from '#shared/api/letters'

/** Which letters the person gets and what they watch; each change is kept at once. */
export function useOwnLetters() {
  const api = useApi()
  const read = useRead<OwnLetters>(signal => api.get('/api/me/letters', { signal }))
  const busy = ref(false)

  let last: Promise<unknown> = Promise.resolve()

  /** One after the other: of two quick ticks the later one is what holds. */
  function keep(path: string, body: Readonly<Record<string, unknown>>): Promise<boolean> {
    const kept = last.then(() => send(path, body))
    last = kept
    return kept
  }

  async function send(path: string, body: Readonly<Record<string, unknown>>): Promise<boolean> {
    busy.value = true
    try {
      read.data.value = await api.post<OwnLetters>(path, body, { key: newRequestKey() })
      read.problem.value = undefined
    }
    catch (failure) {
      read.problem.value = toProblem(failure)
    }
    busy.value = false
    return read.problem.value === undefined
  }

  return {
    ...read, busy,
    choose: (kind: LetterKind, wanted: boolean) => keep('/api/me/letters', { kind, wanted }),
    watchPlace: (scope: WatchScope, scopeId: number, watched: boolean) => keep('/api/me/watches', { scope, scopeId, watched }),
    watches: (scope: WatchScope, scopeId: number): Watch | undefined => read.data.value?.watches.find(watch => watch.scope === scope && watch.scopeId === scopeId),
  }
}
