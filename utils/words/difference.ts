import type { FieldChange } from '#shared/diff/types'
import { formatNumber } from '#shared/units/number'

const signed = (value: number, digits: number) => {
  const text = formatNumber(Number(value.toFixed(digits)))
  return value > 0 ? `+${text}` : text.replace('-', '−')
}

/** Places are told by how far they moved; a percentage of a place says nothing. */
const places = new Set(['target', 'approach', 'softLimitMin', 'softLimitMax', 'homeOffset', 'modulo', 'from', 'to', 'mountingAngle', 'next', 'nodeAddress', 'selectInputs'])

/** How much a value changed, as one reads it: points for percentages, distance for places, percent for the rest. */
export function differenceWords(change: FieldChange): string {
  if (change.before === undefined) return change.after === undefined ? '' : 'added'
  if (change.after === undefined) return 'removed'
  if (change.points !== undefined) return `${signed(change.points, 6)} ${Math.abs(change.points) === 1 ? 'point' : 'points'}`
  if (change.field === 'next') return ''
  if (places.has(change.field) || change.percent === undefined) {
    return change.delta === undefined ? '' : `${signed(change.delta, 6)}${change.unit ? ` ${change.unit}` : ''}`
  }
  const percent = Math.abs(change.percent)
  return `${signed(change.percent, percent < 1 ? 2 : percent < 10 ? 1 : 0)} %`
}
