import { useDocumentVisibility } from '@vueuse/core'
import { swapKitAnswer, swapSchema, type Swap } from '#shared/api/swaps'
import type { JudgingContext } from '#shared/api/uploads'
import { axisSchema, type Axis } from '#shared/api/versions'
import { nameplateSchema } from '#shared/settings/nameplate'
import { z } from 'zod'
import { trimCopies } from '~/utils/device/copies'
import { fileBodyOf } from '~/utils/swap/outbox'
import { reducedSpeeds } from '~/utils/swap/motion'
import { standingOf } from '~/utils/swap/steps'

/** How often it is looked whether another device went on, in ms. */
const lookAgain = 6000

/** One swap as the vault has it, and what waits for it here. What was read last stays, on this device too. */
export function useSwap(id: () => number) {
  const api = useApi()
  const session = useSession()
  const store = useOutboxStore()
  const outbox = useOutbox()
  const visibility = useDocumentVisibility()
  const swap = shallowRef<Swap>()
  const path = (end = '') => `/api/swaps/${id()}${end}`

  const { data, problem, readAt, seenAt, reload, keep } = useKeptRead(path, swapSchema, signal => api.get<Swap>(path(), { signal }), [id])
  /** An answer that was overtaken by a newer one is left. */
  function take(next: Swap | undefined): void {
    if (!next || (swap.value?.id === next.id && next.rev < swap.value.rev)) return
    swap.value = next
  }
  /** An answer of the vault to something that was entered: as good as one that was read. */
  function answered(next: unknown): void {
    take(next as Swap)
    keep(next as Swap)
  }
  watch(data, take)
  watch(readAt, () => store.heard(true))
  watch(problem, now => now && store.heard(!now.unanswered))
  // At once: what is entered next follows on the answer.
  watch(() => store.taken, taken => taken?.entry.swapId === id() && answered(taken.answer), { flush: 'sync' })
  useIntervalFn(() => { if (visibility.value === 'visible') void reload() }, lookAgain)

  const mine = computed(() => store.entries.filter(entry => entry.swapId === id() && entry.personId === session.me?.id))
  const waiting = computed(() => mine.value.filter(({ refused }) => refused === null))
  const refused = computed(() => mine.value.find(entry => entry.refused !== null))
  // What the other device did stands beside what was refused at once.
  watch(() => store.overtaken, told => told?.swapId === id() && take(told.current as Swap), { flush: 'sync' })
  const standing = computed(() => swap.value && store.loaded ? standingOf(swap.value, waiting.value) : undefined)

  /** What is in, and by which values: what was read for it holds until that changes. */
  const goesIn = computed(() => swap.value?.unitIn ? [swap.value.unitIn.id, swap.value.versionId, swap.value.forcesConfirmed?.at].join(' ') : undefined)
  /** All reduced speeds at once: the choice is made at the machine, where there may be no reception. */
  const { data: kitList, problem: noKit } = useKeptRead(
    () => goesIn.value && `${path('/kit')} ${goesIn.value}`, z.array(swapKitAnswer),
    signal => goesIn.value && session.may('technician', 'planner') ? Promise.all(reducedSpeeds.map(speedPercent => api.get<z.infer<typeof swapKitAnswer>>(path('/kit'), { query: { speedPercent }, signal }))) : Promise.resolve(undefined), [goesIn],
  )
  watch(noKit, now => now && store.heard(!now.unanswered))
  const kits = computed(() => new Map((kitList.value ?? []).map(kit => [kit.speedPercent, kit])))

  const axisId = computed(() => swap.value?.axisId)
  const axisPath = () => axisId.value === undefined ? undefined : `/api/axes/${axisId.value}`
  const { data: axis } = useKeptRead(axisPath, axisSchema, async signal => axisPath() ? api.get<Axis>(axisPath() ?? '', { signal }) : undefined, [axisId])
  const unit = computed(() => swap.value?.unitIn?.id)
  const { data: nameplate } = useKeptRead(() => unit.value === undefined ? undefined : `nameplate of unit ${unit.value}`, nameplateSchema, async (signal) => {
    const into = swap.value?.unitIn
    if (!into) return undefined
    return (await api.get<JudgingContext>('/api/judging-context', { query: { serial: into.serial, channel: into.channel ?? undefined }, signal })).nameplate ?? undefined
  }, [unit])

  onMounted(() => trimCopies(Date.now()))

  /** Keeps what was entered, and sends it. */
  async function enter(step: string, value: Readonly<Record<string, unknown>>, says: string, rev = swap.value?.rev): Promise<void> {
    if (!swap.value || rev === undefined) return
    await outbox.enter({ swapId: id(), tag: swap.value.tag, path: path(`/${step}`), rev, body: { kind: 'json', value }, says })
  }
  async function enterFile(step: string, file: File, mediaType: string): Promise<void> {
    if (!swap.value) return
    const { tag, rev } = swap.value
    await outbox.enter({ swapId: id(), tag, path: path(`/${step}`), rev, body: await fileBodyOf(file, mediaType), says: `Read-back ${file.name}` })
  }
  /** A note that was not sent yet gives way to the newer one. */
  async function enterNote(note: string, rev: number): Promise<void> {
    for (const { key } of waiting.value.filter(entry => entry.path === path('/note'))) await store.drop(key)
    await enter('note', { note }, note === '' ? 'hand-over note emptied' : `hand-over note “${note.length > 80 ? `${note.slice(0, 80)}…` : note}”`, rev)
  }

  return { swap, axis, nameplate, problem, readAt, seenAt, reload, take, waiting, refused, standing, kits, enter, enterFile, enterNote, outbox, path }
}
