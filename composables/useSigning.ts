import type { Ref } from 'vue'

/** Sends something that is signed with the password; the password is forgotten as soon as it was sent or the dialog closed. */
export function useSigning(path: () => string, open: Ref<boolean | undefined>, done: () => void) {
  const api = useApi()
  const password = ref('')
  const problem = shallowRef<ApiProblem>()
  const busy = ref(false)

  watch(open, () => {
    password.value = ''
    problem.value = undefined
  })

  async function send(body: Readonly<Record<string, unknown>>): Promise<void> {
    busy.value = true
    problem.value = undefined
    try {
      await api.post(path(), { ...body, password: password.value }, { key: newRequestKey() })
      open.value = false
      done()
    }
    catch (failure) {
      problem.value = toProblem(failure)
    }
    password.value = ''
    busy.value = false
  }
  return { password, problem, busy, send }
}
