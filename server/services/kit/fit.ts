import { judge } from '#shared/checks/judge'
import type { Waiver } from '#shared/checks/waivers'
import { forceBaseOf } from '#shared/motion/force-base'
import { Refusal } from '#shared/errors/refusal'
import { serialToBeWritten } from '#shared/settings/identity'
import type { Content, UnitIdentity } from '#shared/settings/types'
import { judgingQueries, type AxisPlace } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { UnitRow } from '#server/database/schema'
import { judgeInputOf, readAgainst } from '../uploads/read-against'
import { waived } from '../waivers/accepted'
import { differingBases, holdsForces, withoutTaught, type KitSource, type KitUnit } from './kit-file'

/** What goes into the kit, for whom, and what has to be said beside it. */
export interface Fitted {
  readonly content: Content
  readonly identity: UnitIdentity
  /** Names of what is to be taught. */
  readonly left: readonly string[]
  readonly warnings: readonly string[]
}

/** For a serial that is not registered, or none yet: the values as they stand. Nothing is known of what the unit can bear. */
export function asItStands({ content, model }: KitSource, { channel }: UnitIdentity, serial: string | undefined): Fitted {
  return {
    content, left: [], identity: { serial: serial ?? serialToBeWritten, ...(channel === undefined ? {} : { channel }), model },
    warnings: ['The unit is not registered: values that it must be taught are still in here, and nothing was judged against its nameplate.'],
  }
}

/** For a registered unit: taught values left out, judged against its nameplate. Percentages that would mean other newtons are refused. */
export function fitToUnit(db: VaultDb, place: AxisPlace, source: KitSource, row: UnitRow, now: string): Fitted {
  const nameplate = judgingQueries(db).nameplate.get({ model: row.model })?.nameplate
  const unit: KitUnit = { identity: identityOf(row), ...(nameplate ? { nameplate } : {}) }
  if (nameplate && nameplate.axisKind !== place.axis.axisKind) throw new Refusal('axis-kind', `${row.model} is a ${nameplate.axisKind} unit, ${place.axis.tag} a ${place.axis.axisKind} axis.`)
  assertSameForces(source, unit)
  const { content, left } = withoutTaught(source, unit)
  return { content, left, identity: unit.identity, warnings: [...forceWarning(source, unit), ...stopWarnings(db, place, row, content, now)] }
}

/** A registered unit as a file names it. */
export function identityOf({ serial, channel, model, firmware, actuatorSerial, actuatorModel }: UnitRow): UnitIdentity {
  const optional = { channel, firmware, actuatorSerial, actuatorModel }
  return { serial, model, ...Object.fromEntries(Object.entries(optional).filter(([, value]) => value !== null && value !== '')) }
}

function assertSameForces(source: KitSource, unit: KitUnit): void {
  const bases = holdsForces(source.content) ? differingBases(source, unit) : undefined
  if (!bases) return
  const [from, to] = [bases.from, bases.to].map(base => `${base} ${source.content.axisKind === 'linear' ? 'N' : 'N·m'}`)
  throw new Refusal('forces-differ', `100 % means ${from} on ${source.model} and ${to} on ${unit.identity.model}: the same percentages would press with another force. Take a unit with the same base, or work out the percentages by hand and upload the result.`)
}

/** Two models of which one does not say what 100 % means. */
function forceWarning(source: KitSource, { identity, nameplate }: KitUnit): string[] {
  if (!holdsForces(source.content) || identity.model === source.model) return []
  const silent = [[source.model, source.nameplate], [identity.model, nameplate]] as const
  const models = silent.filter(([, plate]) => forceBaseOf(plate) === undefined).map(([model]) => model)
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
