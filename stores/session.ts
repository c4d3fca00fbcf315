import { defineStore } from 'pinia'
import type { Role } from '#shared/api/common'
import type { Me } from '#shared/api/people'

/** Who is signed in on this page. What a person may do is decided by the vault; this only spares them closed doors. */
export const useSession = defineStore('session', () => {
  const me = ref<Me>()
  const asked = ref(false)

  /** Asks once who is signed in; later calls keep the answer until it is forgotten. */
  async function find(): Promise<Me | undefined> {
    if (asked.value) return me.value
    try {
      me.value = await $fetch<Me>('/api/me', { retry: 0 })
      asked.value = true
    }
    catch (failure) {
      const problem = toProblem(failure)
      if (problem.problem.status !== 401) throw problem
      asked.value = true
    }
    return me.value
  }

  function begin(person: Me): void {
    me.value = person
    asked.value = true
  }

  function forget(): void {
    me.value = undefined
    asked.value = true
  }

  /** Asks anew: after something was registered the vault is no longer empty. */
  async function renew(): Promise<void> {
    asked.value = false
    await find()
  }

  const may = (...roles: Role[]): boolean => roles.some(role => me.value?.roles.includes(role))
  return { me, find, begin, forget, renew, may }
})
