import { useEventListener, useSessionStorage } from '@vueuse/core'
import { defineStore } from 'pinia'
import { noWords, type Words } from '~/utils/upload/fields'
import type { ListedFile } from '~/utils/upload/model'
import type { Outcome } from '~/utils/upload/outcome'

export type Step = 'waits' | 'going' | 'done'
export interface Sending {
  readonly step: Step
  /** Of the last try: the same key, body and words on a retry are the same request. */
  readonly key: string
  readonly words: string
  readonly outcome: Outcome | null
}

/**
 * The list that is being made ready: files and what became of them live as long as this page, so that a look at the tray
 * or a new sign-in loses nothing; the words beside them outlive a reload.
 */
export const useUploads = defineStore('uploads', () => {
  const files = shallowRef<readonly ListedFile[]>([])
  /** What was dropped and is not in the list, each with its reason. */
  const left = shallowRef<readonly { readonly name: string, readonly why: string }[]>([])
  const sendings = shallowRef<ReadonlyMap<number, Sending>>(new Map())
  const seenStops = ref(false)
  const startedAt = ref<number>()
  const endedAt = ref<number>()
  const words = useSessionStorage<Words>('witnessmark-upload-words', noWords(), { mergeDefaults: true })
  const sending = computed(() => startedAt.value !== undefined && endedAt.value === undefined)

  // Here and not on the page: files go on being sent while another page is looked at.
  useEventListener(window, 'beforeunload', (event: BeforeUnloadEvent) => {
    if (sending.value) event.preventDefault()
  })

  const setReadings = (readings: ReadonlyMap<number, ListedFile['reading']>) => {
    files.value = files.value.map((file) => {
      const reading = readings.get(file.id)
      return reading ? { ...file, reading } : file
    })
  }
  const setSending = (id: number, next: Sending) => {
    sendings.value = new Map(sendings.value).set(id, next)
  }

  function clear(): void {
    files.value = []
    left.value = []
    sendings.value = new Map()
    seenStops.value = false
    startedAt.value = undefined
    endedAt.value = undefined
    words.value = { ...noWords(), changedBy: words.value.changedBy }
  }

  return { files, left, sendings, seenStops, startedAt, endedAt, words, sending, setReadings, setSending, clear }
})
