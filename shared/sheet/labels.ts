import { setupField } from '../settings/fields'
import type { Dictionary, Nameplate } from '../settings/nameplate'
import type { AxisKind } from '../settings/types'

/** A field in the words of the sheet: "Soft limit, min", "Zone 2, from"; a name that is no field as it stands. */
export function labelOf(name: string): string {
  const zone = /^zone:(\d+):(\w+)$/.exec(name)
  const label = zone ? `zone ${zone[1] ?? ''}, ${zone[2] ?? ''}` : setupField(name)?.label ?? name
  return label.slice(0, 1).toUpperCase() + label.slice(1)
}

/** A value of the drive's own by its dictionary name and key, by its key alone where it has no name. */
export function extraLabel(key: string, dictionary: Dictionary | undefined): string {
  const name = dictionary && Object.hasOwn(dictionary, key) ? dictionary[key]?.name : undefined
  return name === undefined ? key : `${name} (${key})`
}

/** The canonical unit, with ± where the value stands for both sides; '' for bare numbers, words and unknown extras. */
export function unitOf(name: string, axisKind: AxisKind, nameplate: Pick<Nameplate, 'dictionary'> | undefined): string {
  if (name.startsWith('zone:')) return axisKind === 'linear' ? 'mm' : 'deg'
  if (name.startsWith('extra:')) {
    const key = name.slice('extra:'.length)
    return (nameplate?.dictionary && Object.hasOwn(nameplate.dictionary, key) ? nameplate.dictionary[key]?.unit : undefined) ?? ''
  }
  const field = setupField(name)
  if (field?.type !== 'number') return ''
  const unit = field.unit[axisKind] ?? ''
  return field.plusMinus === true && unit !== '' ? `± ${unit}` : unit
}
