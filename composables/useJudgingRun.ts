import type { JudgingRun, Rejudged } from '#shared/api/judging'

const pause = 400

/** Has the vault judge every current version again, and follows how far that has come until the page is left. */
export function useJudgingRun() {
  const api = useApi()
  const run = shallowRef<JudgingRun>()
  const problem = shallowRef<ApiProblem>()
  const busy = ref(false)
  let left = false
  onScopeDispose(() => { left = true })

  async function follow(id: number): Promise<void> {
    let changed: readonly Rejudged[] = []
    while (!left) {
      const answer = await api.get<JudgingRun>(`/api/judging-runs/${id}`, { query: { from: changed.length } })
      changed = [...changed, ...answer.changed]
      run.value = { ...answer, changed: [...changed] }
      if (answer.problem !== null || answer.done === answer.of) return
      await new Promise((resolve) => { setTimeout(resolve, pause) })
    }
  }

  async function begin(): Promise<void> {
    busy.value = true
    problem.value = undefined
    run.value = undefined
    try {
      const { id } = await api.post<{ id: number }>('/api/judging-runs', undefined, { key: newRequestKey() })
      await follow(id)
    }
    catch (failure) {
      problem.value = toProblem(failure)
    }
    busy.value = false
  }
  return { run, problem, busy, begin }
}
