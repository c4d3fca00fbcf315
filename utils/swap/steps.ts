import type { Swap, SwapTick } from '#shared/api/swaps'
import { standingResults } from '#shared/swap/motion-results'
import { attemptsOfUnit } from './attempts'
import type { OutboxEntry } from './outbox'

export type StepNumber = 1 | 2 | 3 | 4 | 5 | 6 | 7 | 8 | 9

export const stepTitles: Readonly<Record<StepNumber, string>> = {
  1: 'Which axis, what failed', 2: 'With what', 3: 'Kit', 4: 'Make it safe, fit, check', 5: 'Write', 6: 'Read back', 7: 'First motion', 8: 'Running', 9: 'Released',
}

/** What was ticked between two steps for the unit in, on whichever device; what waits here counts as ticked. */
export interface Ticks {
  readonly kit: boolean
  /** Lines that are written, by their key, with who ticked them; undefined while that waits. */
  readonly lines: ReadonlyMap<string, { readonly by: string, readonly at: string } | undefined>
  readonly written: boolean
  /** The attempt whose verdict was read and gone on from; 0 for none. */
  readonly verdict: number
  /** The first motion was left as it stands, on to running. */
  readonly motion: boolean
}

const tickOf = ({ path, body }: OutboxEntry) => path.endsWith('/ticks') && body.kind === 'json' ? [body.value as unknown as SwapTick] : []

export function ticksOf({ ticks }: Swap, waiting: readonly OutboxEntry[]): Ticks {
  const here = waiting.flatMap(tickOf)
  const lines = new Map<string, { by: string, at: string } | undefined>(ticks.lines.map(({ line, by, at }) => [line, { by, at }]))
  for (const tick of here) {
    if (tick.tick !== 'line') continue
    if (tick.done) lines.set(tick.line, undefined)
    else lines.delete(tick.line)
  }
  const waits = (wanted: SwapTick['tick']) => here.some(({ tick }) => tick === wanted)
  return {
    kit: ticks.kit !== null || waits('kit'), lines, written: ticks.written !== null || waits('written'), motion: ticks.motion !== null || waits('motion'),
    verdict: Math.max(ticks.verdict?.attempt ?? 0, ...here.flatMap(tick => tick.tick === 'verdict' ? [tick.attempt] : [])),
  }
}

export interface Standing {
  /** The step that is open; null once the swap has ended. */
  readonly open: StepNumber | null
  /** Steps of which something waits for reception. */
  readonly waits: ReadonlySet<StepNumber>
}

const stepOfPath: Readonly<Record<string, StepNumber>> = { 'source': 1, 'unit-in': 2, 'cautions': 3, 'safe': 4, 'read-back': 6, 'missing-keys': 6, 'first-motion': 7, 'note': 8, 'running': 8 }

const stepOfTick: Readonly<Record<SwapTick['tick'], StepNumber>> = { kit: 3, line: 5, written: 5, verdict: 6, motion: 7 }

/** The step that an entry belongs to; undefined for one that ends or turns the swap. */
export function stepOfEntry(entry: OutboxEntry): StepNumber | undefined {
  const [tick] = tickOf(entry)
  return tick ? stepOfTick[tick.tick] : stepOfPath[entry.path.slice(entry.path.lastIndexOf('/') + 1)]
}

/** What was entered at a step and moves the swap on when it is taken: neither ticks nor a note that is still written. */
export function movesOn(entry: OutboxEntry): boolean {
  return tickOf(entry).length === 0 && !entry.path.endsWith('/note')
}

/** The hand-over note as far as it is written: what waits here is newer than what the vault has. */
export function noteOf({ draft }: Swap, waiting: readonly OutboxEntry[]): string {
  const here = waiting.findLast(({ path, body }) => path.endsWith('/note') && body.kind === 'json')
  return here?.body.kind === 'json' ? String(here.body.value.note) : draft?.note ?? ''
}

/** Whether percentages that mean other newtons still want a name, or an unfit unit a planner's. */
export function unsettled({ adjustments, forcesConfirmed, fit, unfit, reasons }: Swap): boolean {
  return (adjustments.some(({ newtonsBefore }) => newtonsBefore !== null) && forcesConfirmed === null) || (fit === 'unfit' && (unfit === null || reasons.some(({ hard }) => hard)))
}

/** A read-back that nobody has looked at yet, before the axis has moved. */
function verdictUnread(swap: Swap, { verdict }: Ticks, waits: ReadonlySet<StepNumber>): boolean {
  return swap.firstMotion === null && !waits.has(7) && verdict < (attemptsOfUnit(swap).at(-1)?.attempt ?? 0)
}

/** Every item was tried, and the newest result of each is as it should be. */
function motionDone({ step, firstMotion }: Swap): boolean {
  if (step !== 'running' || !firstMotion || firstMotion.untried.length > 0) return false
  return standingResults(firstMotion.results).every(({ outcome }) => outcome === 'ok')
}

/** Where a swap stands for this device: what the vault says, then what waits here. */
export function standingOf(swap: Swap, waiting: readonly OutboxEntry[]): Standing {
  const stepsOf = (entries: readonly OutboxEntry[]) => new Set(entries.flatMap(entry => stepOfEntry(entry) ?? []))
  const waits = stepsOf(waiting.filter(movesOn))
  const ticks = ticksOf(swap, waiting)
  const open = ((): StepNumber | null => {
    if (swap.step === 'released' || swap.step === 'abandoned') return null
    if (swap.step === 'unit-in' || (swap.step === 'safe' && unsettled(swap))) return 2
    if (swap.step === 'safe' && !waits.has(4)) return ticks.kit ? 4 : 3
    if (swap.step === 'safe' || swap.step === 'read-back') return ticks.written || attemptsOfUnit(swap).length > 0 || waits.has(6) ? 6 : 5
    if (swap.step !== 'release' && !waits.has(8)) return verdictUnread(swap, ticks, waits) ? 6 : ticks.motion || motionDone(swap) ? 8 : 7
    return 9
  })()
  return { open, waits: stepsOf(waiting) }
}
