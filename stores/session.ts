import { useLocalStorage } from '@vueuse/core'
import { defineStore } from 'pinia'
import type { Role } from '#shared/api/common'
import { meSchema, type Me } from '#shared/api/people'
import { copyOf, copyOfMe, dropCopies } from '~/utils/device/copies'

/** Who is signed in on this page. What a person may do is decided by the vault; this only spares them closed doors. */
export const useSession = defineStore('session', () => {
  const me = ref<Me>()
  const asked = ref(false)
  /** This is a shared panel: nothing that was read stays on it. */
  const panel = useLocalStorage('witnessmark-panel', false)

  /** Asks once who is signed in; later calls keep the answer until it is forgotten. */
  async function find(): Promise<Me | undefined> {
    if (asked.value) return me.value
    try {
      me.value = await $fetch<Me>('/api/me', { retry: 0 })
      asked.value = true
    }
    catch (failure) {
      const problem = toProblem(failure)
      if (problem.problem.status !== 401) {
        if (problem.unanswered) me.value ??= await lastHere()
        throw problem
      }
      forget()
    }
    return me.value
  }

  /** Without reception: who was here when the copies were made. The vault is asked again as soon as it answers. */
  async function lastHere(): Promise<Me | undefined> {
    return meSchema.safeParse((await copyOf(copyOfMe, Date.now()))?.value).data
  }

  function begin(person: Me, onPanel = false): void {
    forget()
    me.value = person
    panel.value = onPanel
  }

  /** Nobody is signed in here: copies of what was read go too. */
  function forget(): void {
    me.value = undefined
    asked.value = true
    void dropCopies()
  }

  /** Asks anew: after something was registered the vault is no longer empty. */
  async function renew(): Promise<void> {
    asked.value = false
    await find()
  }

  const may = (...roles: Role[]): boolean => roles.some(role => me.value?.roles.includes(role))
  return { me, panel, find, begin, forget, renew, may }
})
