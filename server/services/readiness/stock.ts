import { ruleSetVersion } from '#shared/checks/table'
import { fitsTonight } from '#shared/swap/spares'
import type { AxisListRow } from '#server/database/axis-state/list'
import { readTerms, type JudgingTerms } from '#server/database/judging/terms'
import { logQueries } from '#server/database/log/queries'
import type { VaultDb } from '#server/database/prepared'
import type { UnitRow } from '#server/database/schema'
import { readSpareFits } from '#server/database/spare-fit/queries'
import type { SpareFitRow } from '#server/database/spare-fit/table'
import { spareUnits } from '#server/database/unit/queries'
import { placeOf } from '../swaps/sides'
import { kindOf, liesFor, tried } from '../swaps/spares'
import { versionRow } from '../versions/read-version'

/** Whether a spare in stock fits. `settled`: by all that holds now; else as it was before, or no where nothing was known. */
export interface Answer { readonly fits: boolean, readonly settled: boolean }
export interface Stock { readonly spareFor: (row: AxisListRow) => Answer }

/** What stands until the next entry of the log, or until a waiver ends. */
interface Held {
  /** The newest entry, whole: a write that was taken back leaves a seq to the next one. */
  readonly entry: string
  readonly terms: JudgingTerms
  /** One unit of each kind, by site, and all by id. */
  readonly near: Map<number, readonly { readonly kind: string, readonly unit: UnitRow }[]>
  readonly spares: ReadonlyMap<number, UnitRow>
  readonly answers: Map<number, Answer>
}
type Fits = Map<number, Map<string, Pick<SpareFitRow, 'terms' | 'fits'>>>
/** `fits` is what was worked out so far, `unkept` what of it is not in the database yet. */
interface Known { readonly fits: Fits, unkept: SpareFitRow[], held: Held | null }

const knownOf = new WeakMap<VaultDb, Known>()
/** How many fits one answer works out, some milliseconds each: others wait. A plant larger than that is worked out beside (keep-fits.ts). */
const atOnce = 20

function known(db: VaultDb): Known {
  const before = knownOf.get(db)
  if (before) return before
  const fits: Fits = new Map()
  for (const { axisId, kind, ...rest } of readSpareFits(db)) put(fits, axisId, kind, rest)
  const made = { fits, unkept: [], held: null }
  knownOf.set(db, made)
  return made
}

function put(fits: Fits, axisId: number, kind: string, value: Pick<SpareFitRow, 'terms' | 'fits'>): void {
  const ofAxis = fits.get(axisId) ?? new Map<string, typeof value>()
  ofAxis.set(kind, value)
  fits.set(axisId, ofAxis)
}

function heldAt(db: VaultDb, before: Held | null, now: string): Held {
  const entry = logQueries(db).newest.get()?.leaf ?? ''
  if (before?.entry === entry && (before.terms.until === null || now < before.terms.until)) return before
  return { entry, terms: readTerms(db, now), near: new Map(), answers: new Map(), spares: new Map(spareUnits(db).map(unit => [unit.id, unit])) }
}

/** The stock of now. Works out at most `most` fits that nobody knows yet. */
export function readStock(db: VaultDb, now: string, most = atOnce): Stock {
  const memory = known(db)
  const held = heldAt(db, memory.held, now)
  memory.held = held
  let left = most
  const workOut = (row: AxisListRow, versionId: number, unit: UnitRow, kind: string, terms: string): boolean => {
    left -= 1
    const { answer } = tried(db, placeOf(db, row.axis.id), versionRow(db, versionId), unit, { replaced: 'unit', putBack: false, facts: {} }, now)
    const fits = fitsTonight(answer)
    put(memory.fits, row.axis.id, kind, { terms, fits })
    memory.unkept.push({ axisId: row.axis.id, kind, terms, fits })
    return fits
  }
  const answerOf = (row: AxisListRow): Answer => {
    const versionId = row.marked?.id ?? row.current?.id ?? null
    const model = row.unit?.model ?? null
    // Nothing was ever read, so that nothing can be tried: one of the model that is fitted.
    if (versionId === null) return { fits: nearOf(held, row.site.id).some(({ unit }) => unit.model === model), settled: true }
    let before = false
    let settled = true
    for (const { kind, unit } of candidates(held, row)) {
      const terms = termsOf(held, row, versionId, unit)
      const found = memory.fits.get(row.axis.id)?.get(kind)
      const fits = found?.terms === terms ? found.fits : left > 0 ? workOut(row, versionId, unit, kind, terms) : undefined
      if (fits) return { fits, settled: true }
      if (fits === undefined) [settled, before] = [false, before || found?.fits === true]
    }
    return { fits: before, settled }
  }
  return {
    spareFor: (row) => {
      const before = held.answers.get(row.axis.id)
      if (before && (before.settled || left <= 0)) return before
      const answer = answerOf(row)
      held.answers.set(row.axis.id, answer)
      return answer
    },
  }
}

/** What was worked out since the last time, to be kept. */
export function takeUnkept(db: VaultDb): readonly SpareFitRow[] {
  const memory = known(db)
  const { unkept } = memory
  memory.unkept = []
  return unkept
}

function nearOf({ near, spares }: Held, siteId: number): readonly { readonly kind: string, readonly unit: UnitRow }[] {
  const before = near.get(siteId)
  if (before) return before
  const ofKind = new Map([...spares.values()].filter(unit => liesFor(unit, siteId)).toReversed().map(unit => [kindOf(unit), unit]))
  const made = [...ofKind].map(([kind, unit]) => ({ kind, unit }))
  near.set(siteId, made)
  return made
}

/** The unit itself that the values were read from where it lies in stock, then its model, then the others: the likest are tried first. */
function candidates(held: Held, { readFrom, site }: AxisListRow): readonly { readonly kind: string, readonly unit: UnitRow }[] {
  const own = readFrom?.id === undefined || readFrom.id === null ? undefined : held.spares.get(readFrom.id)
  const near = nearOf(held, site.id).filter(({ unit }) => unit.id !== own?.id)
  const like = near.filter(({ unit }) => unit.model === readFrom?.model)
  return [...(own && liesFor(own, site.id) ? [{ kind: 'own', unit: own }] : []), ...like, ...near.filter(one => !like.includes(one))]
}

/** All that a fit hangs on beside the kind of the unit; another text as soon as any of it is another. */
function termsOf({ terms }: Held, { axis, machine, site, readFrom, marked, current }: AxisListRow, versionId: number, unit: UnitRow): string {
  return [
    ruleSetVersion, versionId, (marked ?? current)?.scribeCode, axis.rev, machine.rev, readFrom?.rev, terms.plateOf(readFrom?.model ?? ''), terms.plateOf(unit.model),
    terms.rulesOf(axis.id, machine.id, site.id), terms.waiversOf(axis.id),
  ].join(';')
}
