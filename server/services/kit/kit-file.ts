import { carryOf } from '#shared/settings/carry'
import { forceBaseOf } from '#shared/motion/force-base'
import { setupFieldNames } from '#shared/settings/fields'
import type { Nameplate } from '#shared/settings/nameplate'
import { schemaName, type Content, type SettingsFile, type Setup, type UnitIdentity } from '#shared/settings/types'

/** The unit that the kit is for. */
export interface KitUnit {
  readonly identity: UnitIdentity
  readonly nameplate?: Nameplate
}

export interface KitSource {
  readonly content: Content
  readonly model: string
  readonly firmware?: string
  readonly nameplate?: Nameplate
}

export interface Taught { readonly content: Content, readonly left: readonly string[] }

/** The content without what has to be taught on the new unit, and the names of what was left out (extra as `extra:KEY`). */
export function withoutTaught(source: KitSource, unit: KitUnit): Taught {
  const { setup, extra } = source.content
  const sameModelAndFirmware = unit.identity.model === source.model && unit.identity.firmware !== undefined && unit.identity.firmware === source.firmware
  const context = { homingMethod: setup.homingMethod, replaced: 'unit', sameModelAndFirmware } as const
  const taughtSetup = setupFieldNames.filter(name => setup[name] !== undefined && carryOf(name, context) === 'teach')
  const dictionary = source.nameplate?.dictionary ?? {}
  const taughtExtra = Object.keys(extra).filter(key => Object.hasOwn(dictionary, key) && dictionary[key]?.carry === 'teach')
  return {
    content: { ...source.content, setup: without(setup, taughtSetup) as Setup, extra: without(extra, taughtExtra) as Content['extra'] },
    left: [...taughtSetup, ...taughtExtra.map(key => `extra:${key}`)],
  }
}

function without(record: object, keys: readonly string[]): object {
  return Object.fromEntries(Object.entries(record).filter(([key]) => !keys.includes(key)))
}

/** The bases of two models where both are known and a percentage means other newtons on each; undefined where they agree or cannot be told. */
export function differingBases(source: KitSource, unit: KitUnit): { readonly from: number, readonly to: number } | undefined {
  const [from, to] = [forceBaseOf(source.nameplate), forceBaseOf(unit.nameplate)]
  return from === undefined || to === undefined || from === to ? undefined : { from, to }
}

const forceFields = ['homingForceLimit', 'thrustLimit', 'thrustLimitPositive', 'thrustLimitNegative', 'overloadLevel'] as const

/** Whether the content holds a percentage of the force base at all. */
export function holdsForces({ setup, moves }: Content): boolean {
  return forceFields.some(name => setup[name] !== undefined) || moves.some(move => move.forceLimit !== undefined)
}

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
