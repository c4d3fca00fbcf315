import type { Swap, SwapLine } from '#shared/api/swaps'
import type { AxisKind, ExtraValue } from '#shared/settings/types'
import type { Nameplate } from '#shared/settings/nameplate'
import type { FieldChange } from '#shared/diff/types'
import { setupField } from '#shared/settings/fields'
import { changeWords, extraWords, setupWords } from '~/utils/words/fields'
import { showValue } from '~/utils/format'

/** With a capital at its head, as a sentence begins. */
export const begun = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)

export const replacedWords: Readonly<Record<Swap['replaced'], string>> = { unit: 'whole unit', drive: 'drive only', actuator: 'actuator only' }

const stepWords: Readonly<Record<SwapLine['step'], string>> = {
  'unit-in': 'waits for the unit that goes in', 'safe': 'kit, then make it safe', 'read-back': 'written, then read back', 'first-motion': 'first motion',
  'running': 'ready to run', 'release': 'running, not released', 'released': 'released', 'abandoned': 'abandoned',
}
/** Where a swap stands, in a line of a list. */
export const standsAt = (step: SwapLine['step']) => stepWords[step]

interface Named { readonly section: FieldChange['section'], readonly row?: number, readonly field: string }
export interface ValueName { readonly label: string, readonly place: string, readonly unit: string }

/** The name of a value where it stands by itself: 'Homing force limit' in 'setup', 'Dwell' in 'move 3'. */
export function valueName({ section, row, field }: Named, axisKind: AxisKind, nameplate?: Nameplate): ValueName {
  const words = changeWords({ section, row, field, at: '', weight: 'text', watched: false }, { axisKind, nameplate })
  const homing = section === 'setup' && setupField(field)?.group === 'homing' && !words.label.includes('homing')
  return { label: begun(homing ? `homing ${words.label}` : words.label), place: row === undefined ? section : `${section} ${row}`, unit: words.unit.replace(/^% of .*/, '%') }
}

/** Names of values to be taught or proved, as the kit lists them: a setup name, or `extra:KEY`. */
export function listedName(name: string, axisKind: AxisKind, nameplate?: Nameplate): { readonly label: string, readonly unit: string } {
  const key = /^extra:(.+)$/.exec(name)?.[1]
  const words = key === undefined ? setupWords(name, { axisKind, nameplate }) : extraWords(key, nameplate?.dictionary)
  return { label: begun(words.label), unit: words.unit || (setupField(name)?.type === 'number' ? 'drive’s own' : '') }
}

/** A value without its unit, as it is written into a drive; what is not set says so. */
export function bareValue(value: ExtraValue | undefined): string {
  if (value === undefined) return 'not set'
  const { whole, fraction } = showValue(typeof value === 'object' ? value.value : value)
  return whole + fraction
}

export const forceUnit = (axisKind: AxisKind) => axisKind === 'linear' ? 'N' : 'N·m'
