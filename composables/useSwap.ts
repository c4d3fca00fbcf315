import { useDocumentVisibility, useLocalStorage } from '@vueuse/core'
import type { Swap, SwapKit } from '#shared/api/swaps'
import type { JudgingContext } from '#shared/api/uploads'
import type { Axis } from '#shared/api/versions'
import { fileBodyOf, keptFileLimit } from '~/utils/swap/outbox'
import { reducedSpeeds } from '~/utils/swap/motion'
import { noTicks, standingOf, type OwnTicks } from '~/utils/swap/steps'

/** How often it is looked whether another device went on, in ms. */
const lookAgain = 6000

/** One swap as the vault has it, what waits for it here, and what this device ticked. What was read last stays. */
export function useSwap(id: () => number) {
  const api = useApi()
  const session = useSession()
  const store = useOutboxStore()
  const outbox = useOutbox()
  const visibility = useDocumentVisibility()
  const swap = shallowRef<Swap>()
  const path = (end = '') => `/api/swaps/${id()}${end}`

  const { data, problem, readAt, reload } = useRead(signal => api.get<Swap>(path(), { signal }), [id])
  /** An answer that was overtaken by a newer one is left. */
  function take(next: Swap | undefined): void {
    if (next && (swap.value?.id !== next.id || next.rev >= swap.value.rev)) swap.value = next
  }
  watch(data, take)
  watch(readAt, () => store.heard(true))
  watch(problem, now => now && store.heard(!now.unanswered))
  watch(() => store.taken, taken => taken?.entry.swapId === id() && take(taken.answer as Swap))
  useIntervalFn(() => { if (visibility.value === 'visible') void reload() }, lookAgain)

  const mine = computed(() => store.entries.filter(entry => entry.swapId === id()))
  const waiting = computed(() => mine.value.filter(({ refused }) => refused === null))
  const refused = computed(() => mine.value.find(entry => entry.refused !== null))
  // A refusal brings along what the other device did.
  watch(() => refused.value?.refused?.current, current => current && take(current as Swap))
  const ticks = useLocalStorage<OwnTicks>(() => `witnessmark-swap-${id()}`, noTicks, { mergeDefaults: true })
  const standing = computed(() => swap.value && standingOf(swap.value, ticks.value, waiting.value))

  const kits = shallowRef<ReadonlyMap<number, SwapKit>>(new Map())
  /** All reduced speeds at once: the choice is made at the machine, where there may be no reception. */
  async function readKits(): Promise<void> {
    try {
      const read = await Promise.all(reducedSpeeds.map(async speedPercent => [speedPercent, await api.get<SwapKit>(path('/kit'), { query: { speedPercent } })] as const))
      kits.value = new Map(read)
    }
    catch (failure) {
      store.heard(!toProblem(failure).unanswered)
    }
  }
  watch(() => swap.value && [swap.value.unitIn?.id, swap.value.versionId, swap.value.forcesConfirmed?.at].join(' '), (now) => { if (now && swap.value?.unitIn && session.may('technician', 'planner')) void readKits() })

  const { data: axis } = useRead(async signal => swap.value ? api.get<Axis>(`/api/axes/${swap.value.axisId}`, { signal }) : undefined, [() => swap.value?.axisId])
  const { data: nameplate } = useRead(async (signal) => {
    const unit = swap.value?.unitIn
    if (!unit) return undefined
    return (await api.get<JudgingContext>('/api/judging-context', { query: { serial: unit.serial, channel: unit.channel ?? undefined }, signal })).nameplate ?? undefined
  }, [() => swap.value?.unitIn?.id])

  /** Keeps what was entered, and sends it. False where this device has no room to keep it. */
  function enter(step: string, value: Readonly<Record<string, unknown>>, says: string): boolean {
    if (!swap.value) return false
    return outbox.enter({ swapId: id(), tag: swap.value.tag, path: path(`/${step}`), rev: swap.value.rev, body: { kind: 'json', value }, says })
  }
  async function enterFile(step: string, file: File, mediaType: string): Promise<boolean> {
    if (!swap.value || file.size > keptFileLimit) return false
    const body = await fileBodyOf(file, mediaType)
    return outbox.enter({ swapId: id(), tag: swap.value.tag, path: path(`/${step}`), rev: swap.value.rev, body, says: `Read-back ${file.name}` })
  }

  return { swap, axis, nameplate, problem, readAt, reload, take, waiting, refused, ticks, standing, kits, enter, enterFile, outbox, path }
}
