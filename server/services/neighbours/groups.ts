import type { AxisListRow } from '#server/database/axis-state/list'

/** Axes of one role and one model in a site, in the order of their tags. */
export interface Sisters { readonly role: string, readonly model: string, readonly axes: readonly AxisListRow[] }
/** Axes of one bus in a site. */
export interface OnBus { readonly bus: string, readonly axes: readonly AxisListRow[] }

const collator = new Intl.Collator('en', { numeric: true })
const byTag = (one: AxisListRow, other: AxisListRow) => collator.compare(one.axis.tag, other.axis.tag)

/**
 * The sisters of the axes of a machine, among all axes of their site. An axis without a role, without a unit or never read
 * has nothing to be held against; a group of one is none.
 */
export function sisterGroups(machineId: number, ofSite: readonly AxisListRow[]): Sisters[] {
  const groups = new Map<string, AxisListRow[]>()
  for (const row of ofSite) {
    const { axis, unit, current } = row
    if (axis.role === '' || !unit?.model || !current) continue
    const key = JSON.stringify([axis.role.toLowerCase(), unit.model, axis.axisKind])
    const group = groups.get(key)
    if (group) group.push(row)
    else groups.set(key, [row])
  }
  return [...groups.values()].flatMap((axes) => {
    const [first] = axes
    const own = axes.some(({ machine }) => machine.id === machineId)
    return first?.unit?.model && own && axes.length > 1 ? [{ role: first.axis.role, model: first.unit.model, axes: axes.toSorted(byTag) }] : []
  })
}

/** The buses that the axes of a machine hang on, each with all axes of the site that do; one alone has nobody to share with. */
export function busGroups(machineId: number, ofSite: readonly AxisListRow[]): OnBus[] {
  const own = new Set(ofSite.filter(({ axis, machine }) => machine.id === machineId && axis.bus !== '').map(({ axis }) => axis.bus))
  return [...own].sort().map(bus => ({ bus, axes: ofSite.filter(({ axis }) => axis.bus === bus).toSorted(byTag) })).filter(group => group.axes.length > 1)
}
