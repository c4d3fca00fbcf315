import { schemaName, type Content, type SettingsFile, type UnitIdentity } from '#shared/settings/types'

export interface KitWords {
  readonly tag: string
  readonly number: number
  /** Who marked it known-good and when; null: no version is, and the newest one is given out. */
  readonly mark: { readonly by: string, readonly at: string } | null
  readonly left: readonly string[]
  /** One sentence each, for the person at the machine. */
  readonly warnings: readonly string[]
}

const noteLimit = 2000

/** The note of a kit: whence the values come, whether they are released, what is to be taught. At most 2,000 characters. */
export function kitNote({ tag, number, mark, left, warnings }: KitWords): string {
  const whence = mark
    ? `Kit for ${tag}: version ${number}, known-good by ${mark.by} on ${mark.at.slice(0, 10)}.`
    : `Kit for ${tag}: version ${number}, NOT RELEASED: no version of this axis is known-good, this is the newest.`
  const taught = left.length === 0 ? [] : [`To be taught on the new unit, left out here: ${left.join(', ')}.`]
  const note = [whence, ...taught, ...warnings].join(' ')
  return [...note].length <= noteLimit ? note : `${[...note].slice(0, noteLimit - 1).join('')}…`
}

/** The kit as a settings file of the format. */
export function kitFile(content: Content, unit: UnitIdentity, note: string, exportedAt: string, exportedBy: string): SettingsFile {
  return { ...content, schema: schemaName, unit, exportedAt, exportedBy: [...exportedBy].slice(0, 80).join(''), note, readings: {} }
}
