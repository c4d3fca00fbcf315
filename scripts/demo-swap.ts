import type { PersonActor } from '../server/database/actor'
import type { Vault } from '../server/database/client'
import { makeSafe, readCautions } from '../server/services/swaps/make-safe'
import { recordMotion, sayRunning } from '../server/services/swaps/motion'
import { openSwap } from '../server/services/swaps/open-swap'
import { readBackUnit } from '../server/services/swaps/read-back'
import { releaseSwap } from '../server/services/swaps/release'
import { readSwapKit } from '../server/services/swaps/swap-kit'
import { takeUnitIn } from '../server/services/swaps/unit-in'
import type { FileJson, SwapAct } from './demo-files'
import type { Cast } from './demo-story'

const minute = 60_000
/** In the morning, when the planner is there. */
const untilMorning = 6 * 60 * minute

export interface Swapped { readonly versions: readonly number[], readonly file: FileJson }

/** Plays a swap through the services, the clock some minutes on at each step. */
export function playSwap(vault: Vault, cast: Cast, axisId: number, act: SwapAct, at: number, setClock: (at: number) => void): Swapped {
  let now = at
  const later = (milliseconds: number) => {
    now += milliseconds
    setClock(now)
  }
  const technician = personOf(cast, act.by)
  const { id } = openSwap(vault, technician, { axisId, replaced: 'unit', failure: act.failure, workOrder: act.workOrder })
  later(4 * minute)
  const { fit, reasons } = takeUnitIn(vault, technician, id, { serial: act.serial, forcesConfirmed: true })
  if (fit === 'unfit') throw new Error(`${act.serial} does not fit: ${reasons.map(({ message }) => message).join(' ')}`)
  readCautions(vault, technician, id, { read: true })
  later(35 * minute)
  makeSafe(vault, technician, id, { confirmed: true, blocked: act.blocked })
  const file = (): FileJson => {
    const { content, unit } = readSwapKit(vault, id)
    return { schema: 'witnessmark.axis-settings/1', ...content, setup: { ...content.setup, ...act.taught }, unit: unit as unknown as Record<string, string>, exportedAt: new Date(now - minute).toISOString(), moves: content.moves as unknown as FileJson['moves'] }
  }
  const readBack = (): number => {
    later(9 * minute)
    const read = readBackUnit(vault, technician, id, { bytes: Buffer.from(JSON.stringify(file(), null, 2)), name: 'read-back.json' }, {})
    if (!read.ok) throw read.refusal
    if (read.answer.compare === 'differs') throw new Error(`the read-back differs: ${JSON.stringify(read.answer.differences)}`)
    return read.answer.version.id
  }
  const first = readBack()
  later(14 * minute)
  recordMotion(vault, technician, id, { speedPercent: 10, results: readSwapKit(vault, id).firstMotion.map(({ item }) => ({ item, outcome: 'ok' as const })) })
  const left = readBack()
  later(2 * minute)
  sayRunning(vault, technician, id, act.note === undefined ? {} : { note: act.note })
  if (act.until === 'released' && act.releasedBy !== undefined) {
    later(untilMorning)
    releaseSwap(vault, personOf(cast, act.releasedBy), id, { meaning: 'approved', note: 'Read-back looked through, jars of the first hour in order', ...(act.oldUnitState === undefined ? {} : { oldUnitState: act.oldUnitState }) })
  }
  return { versions: [first, left], file: file() }
}

function personOf(cast: Cast, key: string): PersonActor {
  const person = cast.people[key]
  if (!person) throw new Error(`nobody is ${key}`)
  return person
}
