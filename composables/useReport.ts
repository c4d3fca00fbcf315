import type { Report, reportForms } from '#shared/api/reports'

const pause = 700

/** Takes the file of a report, and says how far the vault has come with making it. */
export function useReport() {
  const api = useApi()
  const making = shallowRef<Report['making']>(null)
  const busy = ref<number>()
  const problem = shallowRef<ApiProblem>()
  let left = false
  onScopeDispose(() => { left = true })

  async function follow(id: number): Promise<void> {
    while (!left && busy.value === id) {
      making.value = (await api.get<Report>(`/api/reports/${id}`)).making
      await new Promise((resolve) => { setTimeout(resolve, pause) })
    }
  }

  async function take(id: number, form: (typeof reportForms)[number] = 'pdf'): Promise<void> {
    busy.value = id
    problem.value = undefined
    try {
      const file = api.file(`/api/reports/${id}/file`, undefined, { query: { form } })
      // How far it has come is a kindness: where that cannot be read the file still comes, or says what failed.
      void follow(id).catch(() => { making.value = null })
      saveFile(await file, `audit-report-${id}.${form}`)
    }
    catch (failure) {
      problem.value = toProblem(failure)
    }
    busy.value = undefined
    making.value = null
  }
  return { take, making, busy, problem }
}
