import type { Swap } from '#shared/api/swaps'
import { attemptsOfUnit } from './attempts'
import type { OutboxEntry } from './outbox'

export type StepNumber = 1 | 2 | 3 | 4 | 5 | 6 | 7 | 8 | 9

export const stepTitles: Readonly<Record<StepNumber, string>> = {
  1: 'Which axis, what failed', 2: 'With what', 3: 'Kit', 4: 'Make it safe, fit, check', 5: 'Write', 6: 'Read back', 7: 'First motion', 8: 'Running', 9: 'Released',
}

/** What this device has ticked between two things that the vault hears of: the kit in hand, the lines of writing. */
export interface OwnTicks {
  /** The unit that the kit in hand is for. */
  readonly kitFor: number | null
  /** The unit that was written, and which lines of it. */
  readonly writtenFor: number | null
  readonly lines: readonly string[]
  /** The attempt whose verdict was read and gone on from. */
  readonly wentOnFrom: number
  /** The unit whose first motion was left as it stands, on to running. */
  readonly ranOnFor: number | null
  /** Reduced speed of the first motion, in percent. */
  readonly speed: number
}
export const noTicks: OwnTicks = { kitFor: null, writtenFor: null, lines: [], wentOnFrom: 0, ranOnFor: null, speed: 10 }

export interface Standing {
  /** The step that is open; null once the swap has ended. */
  readonly open: StepNumber | null
  /** Steps of which something waits for reception. */
  readonly waits: ReadonlySet<StepNumber>
}

const stepOfPath: Readonly<Record<string, StepNumber>> = { 'source': 1, 'unit-in': 2, 'cautions': 3, 'safe': 4, 'read-back': 6, 'missing-keys': 6, 'first-motion': 7, 'running': 8 }

/** The step that an entry belongs to; undefined for one that ends or turns the swap. */
export function stepOfEntry({ path }: Pick<OutboxEntry, 'path'>): StepNumber | undefined {
  return stepOfPath[path.slice(path.lastIndexOf('/') + 1)]
}

/** Whether percentages that mean other newtons still want a name, or an unfit unit a planner's. */
export function unsettled({ adjustments, forcesConfirmed, fit, unfit, reasons }: Swap): boolean {
  return (adjustments.some(({ newtonsBefore }) => newtonsBefore !== null) && forcesConfirmed === null) || (fit === 'unfit' && (unfit === null || reasons.some(({ hard }) => hard)))
}

/** A read-back that nobody at this device has looked at yet, before the axis has moved. */
function verdictUnread(swap: Swap, { wentOnFrom }: OwnTicks, waits: ReadonlySet<StepNumber>): boolean {
  return swap.firstMotion === null && !waits.has(7) && wentOnFrom < (attemptsOfUnit(swap).at(-1)?.attempt ?? 0)
}

/** Every item was tried, and the newest result of each is as it should be. */
function motionDone({ step, firstMotion }: Swap): boolean {
  if (step !== 'running' || !firstMotion || firstMotion.untried.length > 0) return false
  return [...new Map(firstMotion.results.map(({ item, outcome }) => [item, outcome])).values()].every(outcome => outcome === 'ok')
}

/** Where a swap stands for this device: what the vault says, then what waits here, then what was ticked here. */
export function standingOf(swap: Swap, ticks: OwnTicks, waiting: readonly OutboxEntry[]): Standing {
  const waits = new Set(waiting.flatMap(entry => stepOfEntry(entry) ?? []))
  const unit = swap.unitIn?.id
  const open = ((): StepNumber | null => {
    if (swap.step === 'released' || swap.step === 'abandoned') return null
    if (swap.step === 'unit-in' || (swap.step === 'safe' && unsettled(swap))) return 2
    if (swap.step === 'safe' && !waits.has(4)) return ticks.kitFor === unit ? 4 : 3
    if (swap.step === 'safe' || swap.step === 'read-back') return ticks.writtenFor === unit || attemptsOfUnit(swap).length > 0 || waits.has(6) ? 6 : 5
    if (swap.step !== 'release' && !waits.has(8)) return verdictUnread(swap, ticks, waits) ? 6 : ticks.ranOnFor === unit || motionDone(swap) ? 8 : 7
    return 9
  })()
  return { open, waits }
}
