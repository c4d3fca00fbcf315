import type { SiteRule } from '#shared/checks/types'
import type { Entry } from '#shared/trail/entry'
import type { VaultDb } from '#server/database/prepared'
import type { AxisRow, LineRow, MachineRow, NameplateRow, RuleRow, SiteRow, UnitRow } from '#server/database/schema'
import { versionQueries } from '#server/database/version/queries'
import { held, ruleOf, type ReadAgainst } from '../uploads/read-against'

/**
 * The register as it stood at an entry, folded from the entries before it: what a version was compared with and judged by.
 * It holds places, units, nameplates, rules and marks in memory; versions and contents stay where they are.
 */
export interface AsOf {
  readonly read: (entry: Entry) => void
  /** null where the log never spoke of the axis, the unit or their places. */
  readonly against: (db: VaultDb, axisId: number, unitId: number) => ReadAgainst | null
}

type State = Readonly<Record<string, unknown>>

export function foldRegister(): AsOf {
  const states = new Map<string, State>()
  const nameplates = new Map<string, NameplateRow>()
  const marks = new Map<number, number | null>()
  const rules = new Map<number, RuleRow>()
  const of = <Row>(kind: string, id: unknown) => states.get(`${kind} ${String(id)}`) as Row | undefined
  return {
    read: ({ subject: { kind, id }, state }) => {
      if (kind === 'axis' || kind === 'machine' || kind === 'line' || kind === 'site' || kind === 'unit') states.set(`${kind} ${id}`, state)
      if (kind === 'nameplate') nameplates.set((state as unknown as NameplateRow).model, state as unknown as NameplateRow)
      if (kind === 'known-good') marks.set(state.axisId as number, state.versionId as number | null)
      if (kind === 'rule' && state.endedAt === null) rules.set(id as number, state as unknown as RuleRow)
      if (kind === 'rule' && state.endedAt !== null) rules.delete(id as number)
    },
    against: (db, axisId, unitId) => {
      const axis = of<AxisRow>('axis', axisId)
      const machine = of<MachineRow>('machine', axis?.machineId)
      const line = of<LineRow>('line', machine?.lineId)
      const site = of<SiteRow>('site', line?.siteId)
      const unit = of<UnitRow>('unit', unitId)
      if (!axis || !machine || !line || !site || !unit) return null
      const marked = marks.get(axisId)
      const holds = ({ scope, scopeId }: RuleRow) => scopeId === { axis: axis.id, machine: machine.id, site: site.id }[scope]
      return {
        place: { axis, machine, line, site }, unit, nameplate: nameplates.get(unit.model) ?? null,
        rules: [...rules.values()].filter(holds).sort((a, b) => a.id - b.id).map((rule): SiteRule => ruleOf(rule)),
        current: null, knownGood: held(db, marked ? versionQueries(db).byId.get({ id: marked }) : undefined),
      }
    },
  }
}
