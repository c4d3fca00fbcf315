import { judge } from '#shared/checks/judge'
import type { Waiver } from '#shared/checks/waivers'
import { forceBaseOf } from '#shared/motion/force-base'
import { Refusal } from '#shared/errors/refusal'
import { serialToBeWritten } from '#shared/settings/identity'
import type { Content, UnitIdentity } from '#shared/settings/types'
import type { CarryCase } from '#shared/swap/carried'
import { differingBases, holdsForces } from '#shared/swap/rescale'
import type { AxisPlace } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { UnitRow, VersionRow } from '#server/database/schema'
import { kitCase, type SwapKitCase } from '../swaps/sides'
import { judgeInputOf, readAgainst } from '../uploads/read-against'
import { waived } from '../waivers/accepted'

/** What goes into the kit, for whom, and what has to be said beside it. */
export interface Fitted {
  readonly content: Content
  readonly identity: UnitIdentity
  /** Between which units, and how; null: which unit it goes into is not known, and it is made as for one of the same model. */
  readonly carry: CarryCase | null
  /** Names of what is to be taught. */
  readonly left: readonly string[]
  /** Names of what is copied, and proved at the machine. */
  readonly prove: readonly string[]
  readonly warnings: readonly string[]
}

/** For a serial that is not registered, or none yet: the values as they stand. Nothing is known of what the unit can bear. */
export function asItStands(content: Content, { channel, model }: UnitIdentity, serial: string | undefined): Fitted {
  return {
    content, carry: null, left: [], prove: [], identity: { serial: serial ?? serialToBeWritten, ...(channel === undefined ? {} : { channel }), model },
    warnings: ['The unit is not registered: values that it must be taught are still in here, and nothing was judged against its nameplate.'],
  }
}

/** For a registered unit outside of a swap: taught values left out, judged against its nameplate. Percentages that would mean other newtons are refused. */
export function fitToUnit(db: VaultDb, place: AxisPlace, version: VersionRow, row: UnitRow, now: string): Fitted {
  const goes = kitCase(db, place, version, row, { replaced: 'unit', putBack: false, facts: {} })
  const { out, into } = goes.carry
  if (into.nameplate && into.nameplate.axisKind !== place.axis.axisKind) throw new Refusal('axis-kind', `${row.model} is a ${into.nameplate.axisKind} unit, ${place.axis.tag} a ${place.axis.axisKind} axis.`)
  const bases = holdsForces(goes.source) && !goes.carry.ownValues ? differingBases(out, into) : undefined
  if (bases) {
    const [from, to] = [bases.from, bases.to].map(base => `${base} ${goes.source.axisKind === 'linear' ? 'N' : 'N·m'}`)
    throw new Refusal('forces-differ', `100 % means ${from} on ${out.model} and ${to} on ${into.model}: the same percentages would press with another force. Begin a swap: there they are rescaled, and confirmed in newtons.`)
  }
  return fittedTo(db, goes, now)
}

/** As a swap brings it to its unit in: percentages rescaled, taught values left out, both said beside it. */
export function fittedTo(db: VaultDb, { place, unit, kit, carry, source }: SwapKitCase, now: string): Fitted {
  const changed = kit.adjustments.length === 0 ? [] : [`Rescaled for ${unit.model}: ${kit.adjustments.map(({ section, row, field, before, after, unit: sign }) => `${section === 'move' ? `move ${row} ` : ''}${field} ${before} → ${after} ${sign}`).join(', ')}.`]
  const proved = carry.ownValues || kit.prove.length === 0 ? [] : [`To be proved at the machine: ${kit.prove.join(', ')}.`]
  return { content: kit.content, carry, left: kit.teach, prove: kit.prove, identity: identityOf(unit), warnings: [...changed, ...forceWarning(source, carry), ...stopWarnings(db, place, unit, kit.content, now), ...proved] }
}

/** A registered unit as a file names it. */
export function identityOf({ serial, channel, model, firmware, actuatorSerial, actuatorModel }: UnitRow): UnitIdentity {
  const optional = { channel, firmware, actuatorSerial, actuatorModel }
  return { serial, model, ...Object.fromEntries(Object.entries(optional).filter(([, value]) => value !== null && value !== '')) }
}

/** Two models of which one does not say what 100 % means. */
function forceWarning(content: Content, { out, into, ownValues }: SwapKitCase['carry']): string[] {
  if (!holdsForces(content) || ownValues || into.model === out.model) return []
  const models = [out, into].filter(side => forceBaseOf(side.nameplate) === undefined).map(({ model }) => model)
  return models.length === 0 ? [] : [`What 100 % of force means is not on the nameplate of ${models.join(' and ')}: check it before these percentages are written.`]
}

/** Stops on this unit, those that somebody accepted for the axis apart. */
function stopWarnings(db: VaultDb, place: AxisPlace, row: UnitRow, content: Content, now: string): string[] {
  const judged = judge(judgeInputOf(readAgainst(db, place, row), content, { model: row.model, ...(row.firmware === null ? {} : { firmware: row.firmware }) }))
  const { judgement: { results }, accepted } = waived(db, place.axis.id, judged, () => content, now)
  const standing = results.filter(({ level }) => level === 'stop').map(({ message }) => message)
  const taken = accepted.filter(({ result }) => result.level === 'stop')
  const until = (waiver: Waiver) => waiver.until === undefined ? '' : ` until ${new Date(waiver.until).toISOString().slice(0, 10)}`
  return [
    ...(standing.length === 0 ? [] : [`${standing.length} stop ${standing.length === 1 ? 'check' : 'checks'} on this unit: ${standing.join(' ')}`]),
    ...taken.map(({ result, waiver }) => `Accepted${until(waiver)}: ${result.message}`),
  ]
}
