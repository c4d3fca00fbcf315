import type { Board } from '#shared/api/board'
import type { Line, Machine, Site, Unit } from '#shared/api/places'
import { bodyOfStep, type Known, type Plan, type Step, type StepKind } from '~/utils/places/list-plan'

const paths: Readonly<Record<StepKind, string>> = { site: '/api/sites', line: '/api/lines', machine: '/api/machines', axis: '/api/axes', unit: '/api/units', fitting: '/api/fittings' }

export interface StepFailure { readonly step: Step, readonly why: string }

/** Registers what a list names, step by step; what hangs on a step that failed is left out and said so. */
export function useListRegister() {
  const api = useApi()
  const { data: sites } = useRows<Site>('/api/sites')
  const { data: lines } = useRows<Line>('/api/lines')
  const { data: machines } = useRows<Machine>('/api/machines')
  const { data: units } = useRows<Unit>('/api/units')
  const { data: board, problem } = useRead(signal => api.get<Board>('/api/board', { signal }))

  const known = computed<Known | undefined>(() => sites.value && lines.value && machines.value && units.value && board.value
    ? { sites: sites.value, lines: lines.value, machines: machines.value, units: units.value, axes: board.value.axes }
    : undefined)
  const done = ref(0)
  const failures = shallowRef<readonly StepFailure[]>([])
  const running = ref(false)

  async function take(step: Step, ids: Map<string, number>): Promise<void> {
    const body = bodyOfStep(step, ids)
    if (!body) {
      failures.value = [...failures.value, { step, why: 'waits for what could not be registered' }]
      return
    }
    try {
      const { id } = await api.post<{ id: number }>(paths[step.kind], body, { key: newRequestKey() })
      ids.set(step.key, id)
      done.value += 1
    }
    catch (failure) {
      failures.value = [...failures.value, { step, why: toProblem(failure).problem.detail }]
    }
  }

  async function register(plan: Plan): Promise<void> {
    running.value = true
    done.value = 0
    failures.value = []
    const ids = new Map(plan.ids)
    for (const step of plan.steps) await take(step, ids)
    running.value = false
  }

  return { known, problem, done, failures, running, register }
}
