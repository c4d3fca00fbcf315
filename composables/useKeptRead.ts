import type { WatchSource } from 'vue'
import type { z } from 'zod'
import { copyOf, copyOfMe, keepCopy } from '~/utils/device/copies'

/** After so long without an answer the copy is shown meanwhile, in ms: reception that hangs is none. */
const patience = 2500
/** A value that stayed the same is written again after so long, in ms, so that its copy says when it was last seen. */
const again = 60_000

/**
 * As useRead; what was read also stays on this device under a name, and is shown when a reload finds no reception.
 * `seenAt` says when what is shown was read; `name` is undefined while it is not known what is to be read.
 */
export function useKeptRead<Answer>(name: () => string | undefined, schema: z.ZodType<Answer>, read: (signal: AbortSignal) => Promise<Answer | undefined>, sources: WatchSource[] = []) {
  const session = useSession()
  const reading = useRead(read, sources)
  const found = shallowRef<{ readonly called: string, readonly value: Answer, readonly readAt: string }>()
  const copy = computed(() => (found.value?.called === name() ? found.value : undefined))
  const shown = computed(() => reading.data.value ?? copy.value?.value)
  const seenAt = computed(() => (reading.data.value === undefined ? copy.value?.readAt : reading.readAt.value))
  let kept: { readonly text: string, readonly at: number } | undefined

  function keep(value: Answer): void {
    const now = Date.now()
    const text = JSON.stringify(value)
    const { me, panel } = session
    const called = name()
    if (!me || panel || !called || (kept?.text === text && now - kept.at < again)) return
    kept = { text, at: now }
    const mine = { personId: me.id, readAt: new Date(now).toISOString() }
    void keepCopy({ ...mine, name: called, value })
    void keepCopy({ ...mine, name: copyOfMe, value: me })
  }
  async function showCopy(): Promise<void> {
    const called = name()
    if (!called || reading.data.value !== undefined) return
    const row = await copyOf(called, Date.now(), session.me?.id)
    // What an earlier release kept in another form is left.
    const value = row && schema.safeParse(row.value)
    if (row && value?.success) found.value = { called, value: value.data, readAt: row.readAt }
  }

  watch(reading.data, value => value !== undefined && keep(value))
  watch(reading.problem, problem => problem?.unanswered && showCopy())
  const { start } = useTimeoutFn(showCopy, patience)
  watch(name, () => start())
  return { ...reading, data: shown, seenAt, keep }
}
