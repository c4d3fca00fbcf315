import { applyFlat } from '../diff/apply'
import { compareContents } from '../diff/compare'
import type { Comparison, DiffContext, FieldChange } from '../diff/types'
import { hashesOf, type Sha256 } from '../settings/hash'
import { moveFields, type MoveFieldName } from '../settings/move-fields'
import { setEntries } from '../settings/move-row'
import type { Nameplate } from '../settings/nameplate'
import type { Content } from '../settings/types'
import type { KitContent, MissingKey, ReadBackComparison } from './types'

export interface ReadBackCase {
  /** Of the unit that was read back. */
  readonly nameplate?: Nameplate
  /** The kit's values were read from this very unit: then homeOffset is compared like the rest. */
  readonly sameUnit: boolean
  /** Keys that this model's firmware is known to lack. */
  readonly accepted: readonly string[]
  readonly context: DiffContext
}

type Difference = Comparison['differences'][number]

/**
 * What the unit holds against what the kit gave it. Keys that the unit has no place for are told apart from values that are
 * wrong; accepted ones no longer make it differ. The code agrees with the kit's exactly where the verdict is not `differs`.
 */
export function compareReadBack(kit: KitContent, readBack: Content, { nameplate, sameUnit, accepted, context }: ReadBackCase, sha256: Sha256): ReadBackComparison {
  const compared = compareContents(kit.content, readBack, {
    ...(nameplate ? { nameplate } : {}), sameUnit, taught: kit.taughtSetup, taughtExtra: kit.taughtExtra, context,
  })
  const keyOf = missingKeyOf(kit.content, readBack)
  const keys = new Map<string, MissingKey>()
  const differences: Difference[] = []
  const gaps: FieldChange[] = []
  for (const difference of compared.differences) {
    const key = keyOf(difference)
    if (key === undefined) {
      differences.push(difference)
      continue
    }
    const known = accepted.includes(key)
    keys.set(key, { key, weight: difference.weight, accepted: known })
    if (!known) gaps.push(difference)
  }
  const missingKeys = [...keys.values()]
  const differs = differences.length > 0 || gaps.length > 0
  return {
    verdict: differs ? 'differs' : compared.verdict === 'identical' ? 'identical' : 'same',
    differences, within: compared.within, aside: compared.aside, missingKeys,
    rowsMissing: rowsMissing(kit.content, readBack), scribeCode: reckonedCode(kit.content, [...differences, ...gaps], sha256),
  }
}

/**
 * The code of the kit with what differs laid over it; null where what differs is the home offset alone, which no code holds.
 * With nothing that differs it is the kit's own code.
 */
function reckonedCode(kit: Content, differences: readonly FieldChange[], sha256: Sha256): string | null {
  const own = hashesOf(kit, sha256)
  if (differences.length === 0) return own.scribeCode
  const theirs = hashesOf(applyFlat(kit, differences), sha256)
  return theirs.copyHash === own.copyHash ? null : theirs.scribeCode
}

/** Names the key that a difference shows to be missing: gone from setup or extra, or a field that no row has any more. */
function missingKeyOf(kit: Content, readBack: Content): (change: FieldChange) => string | undefined {
  const fieldsThere = new Set(readBack.moves.flatMap(move => setEntries(move).map(([field]) => field)))
  const rowsThere = new Set(readBack.moves.map(({ move }) => move))
  return ({ section, field, row, after }) => {
    if (after !== undefined) return undefined
    if (section === 'setup') return field
    if (section === 'extra') return `extra:${field}`
    const gone = section === 'move' && row !== undefined && rowsThere.has(row) && !moveFields[field as MoveFieldName].needed && !fieldsThere.has(field)
    return gone ? `move.${field}` : undefined
  }
}

/** Rows that the kit has and the unit has not, by their numbers. */
function rowsMissing(kit: Content, readBack: Content): ReadBackComparison['rowsMissing'] {
  const zones = new Set(readBack.zones.map(({ zone }) => zone))
  const moves = new Set(readBack.moves.map(({ move }) => move))
  return [
    ...kit.zones.filter(({ zone }) => !zones.has(zone)).map(({ zone }) => ({ section: 'zone', row: zone }) as const),
    ...kit.moves.filter(({ move }) => !moves.has(move)).map(({ move }) => ({ section: 'move', row: move }) as const),
  ]
}

/** What was to be taught and is not in the read-back, but for keys that this firmware lacks: setup names and `extra:KEY`. */
export function taughtMissing(kit: Pick<KitContent, 'taughtSetup' | 'taughtExtra'>, readBack: Content, accepted: readonly string[]): string[] {
  const setup = kit.taughtSetup.filter(name => readBack.setup[name] === undefined)
  const extra = kit.taughtExtra.filter(key => !Object.hasOwn(readBack.extra, key)).map(key => `extra:${key}`)
  return [...setup, ...extra].filter(key => !accepted.includes(key))
}
