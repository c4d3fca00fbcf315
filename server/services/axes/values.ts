import type { z } from 'zod'
import type { ValueBound, valuesQuery, ValuesAnswer, ValueStep } from '#shared/api/values'
import { nameplateBounds } from '#shared/checks/nameplate-bounds'
import { Refusal } from '#shared/errors/refusal'
import type { AxisKind, ExtraValue } from '#shared/settings/types'
import { isValuePlace, ruleNameOf, unitAt, valueAt, type ValuePlace } from '#shared/settings/value-place'
import type { Vault } from '#server/database/client'
import { readContent } from '#server/database/content/queries'
import { judgingQueries, type AxisPlace } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import { valueQueries } from '#server/database/value/queries'
import { namedPerson } from '../versions/summary'

type Row = ReturnType<ReturnType<typeof valueQueries>['versions']['all']>[number]
interface Held { readonly row: Row, readonly value: ExtraValue | null, readonly step: boolean }

/** One value over all versions of an axis that are not void, in their order: a step for each that changed it. */
export function axisValues({ db }: Vault, axisId: number, { section = 'setup', field, row }: z.output<typeof valuesQuery>): ValuesAnswer {
  const place: ValuePlace = { section, field, ...(row === undefined ? {} : { row }) }
  if (!isValuePlace(place)) throw new Refusal('input', `${ruleNameOf(place)} is no value of the settings format${section === 'move' || section === 'zone' ? ', or its row is missing' : ''}.`, { errors: [{ at: '?field', code: 'field', message: 'no value of the settings format' }] })
  const axis = judgingQueries(db).axis.get({ id: axisId })
  if (!axis) throw new Refusal('not-found', 'There is no such axis.')
  const rows = valueQueries(db).versions.all({ axisId })
  const held = heldBy(db, axisId, rows.filter(({ voidAt }) => voidAt === null), place)
  return {
    section, field, row: row ?? null,
    steps: held.flatMap((one, index) => one.step ? [stepOf(db, one, held[index - 1], place, axis.axis.axisKind)] : []),
    knownGood: knownGoodSpans(db, axisId, held, place),
    bounds: [...ruleBounds(db, axis, place), ...plateBounds(db, held, place)],
    versions: held.length, leftOut: rows.length - held.length,
  }
}

/**
 * What each version holds there. A version differs from its base by its stored changes alone, so that only those with a change
 * of this value, and those whose base is not the one before them (late ones, and where one was voided), are opened.
 */
function heldBy(db: VaultDb, axisId: number, rows: readonly Row[], place: ValuePlace): Held[] {
  const changed = new Set(valueQueries(db).changed.all({ axisId, section: place.section, field: place.field, row: place.row ?? null }).map(({ versionId }) => versionId))
  const held: Held[] = []
  for (const row of rows) {
    const last = held.at(-1)
    const same = last !== undefined && row.baseId === last.row.id && !changed.has(row.id)
    const value = same ? last.value : valueAt(readContent(db, row.contentId), place) ?? null
    held.push({ row, value, step: last === undefined ? value !== null : JSON.stringify(value) !== JSON.stringify(last.value) })
  }
  return held
}

function stepOf(db: VaultDb, { row, value }: Held, last: Held | undefined, place: ValuePlace, axisKind: AxisKind): ValueStep {
  const before = last?.row
  const seenAt = before && valueQueries(db).seen.get({ versionId: before.id, before: row.orderAt })?.at
  return {
    versionId: row.id, number: row.number, at: row.orderAt, capturedAt: row.capturedAt, value, unit: typeof value === 'object' && value !== null ? value.unit : unitAt(place, axisKind),
    before: before ? { versionId: before.id, number: before.number, seenAt: seenAt && seenAt > before.orderAt ? seenAt : before.orderAt } : null,
    occasion: row.occasion, changedBy: namedPerson(db, row.changedBy), allowedBy: namedPerson(db, row.allowedBy), storedBy: row.token === null ? row.storer : `${row.token} (${row.storer})`,
    reason: row.reason, workOrder: row.workOrder, serial: row.serial, model: row.model,
  }
}

function knownGoodSpans(db: VaultDb, axisId: number, held: readonly Held[], place: ValuePlace): ValuesAnswer['knownGood'] {
  const values = new Map(held.map(({ row, value }) => [row.id, value]))
  const marks = valueQueries(db).marks.all({ axisId })
  return marks.flatMap(({ at, versionId, number, contentId }, index) => versionId === null || number === null || contentId === null
    ? []
    : [{ versionId, number, from: at, to: marks[index + 1]?.at ?? null, value: values.get(versionId) ?? valueAt(readContent(db, contentId), place) ?? null }])
}

function ruleBounds(db: VaultDb, { axis, machine, site }: AxisPlace, place: ValuePlace): ValueBound[] {
  const rules = valueQueries(db).rules.all({ axisId: axis.id, machineId: machine.id, siteId: site.id, field: ruleNameOf(place) })
  return rules.flatMap(({ min, max, fixed, madeAt, endedAt, reason }) => {
    const [low, high] = typeof fixed === 'number' ? [fixed, fixed] : [min, max]
    return low === null && high === null ? [] : [{ by: 'rule' as const, ...boundsOf(low ?? undefined, high ?? undefined), from: madeAt, to: endedAt, words: reason }]
  })
}

/** For each stretch of versions from units of one model, by today's revision of its nameplate. */
function plateBounds(db: VaultDb, held: readonly Held[], place: ValuePlace): ValueBound[] {
  const changes = held.filter(({ row }, index) => row.model !== held[index - 1]?.row.model).map(({ row }) => row)
  const newest = held.at(-1)
  const press = place.section === 'move' && newest !== undefined && valueAt(readContent(db, newest.row.contentId), { ...place, field: 'kind' }) === 'press'
  return changes.flatMap(({ model, orderAt }, index) => {
    const plate = judgingQueries(db).nameplate.get({ model })?.nameplate
    const { min, max } = plate ? nameplateBounds(place, plate, press) : {}
    return min === undefined && max === undefined ? [] : [{ by: 'nameplate' as const, ...boundsOf(min, max), from: orderAt, to: changes[index + 1]?.orderAt ?? null, words: model }]
  })
}

const boundsOf = (min: number | undefined, max: number | undefined) => ({ ...(min !== undefined && { min }), ...(max !== undefined && { max }) })
