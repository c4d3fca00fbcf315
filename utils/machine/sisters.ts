import type { Axis } from '#shared/api/versions'

/** Axes of one role and one model in a site, in the order of their tags. */
export interface SisterGroup { readonly key: string, readonly role: string, readonly model: string, readonly axes: readonly Axis[] }

/** Axes of one bus in a site. */
export interface BusGroup { readonly bus: string, readonly axes: readonly Axis[] }

const byTag = (one: Axis, other: Axis) => one.tag.localeCompare(other.tag, 'en', { numeric: true })

/**
 * The sisters of the axes of a machine, among all axes of their site. An axis without a role, without a unit or never read
 * has nothing to be held against; a group of one is none.
 */
export function sisterGroups(machineId: number, ofSite: readonly Axis[]): SisterGroup[] {
  const groups = new Map<string, Axis[]>()
  for (const axis of ofSite) {
    if (axis.role === '' || !axis.unit || !axis.current) continue
    const key = `${axis.role.toLowerCase()} ${axis.unit.model} ${axis.axisKind}`
    groups.set(key, [...groups.get(key) ?? [], axis])
  }
  return [...groups].flatMap(([key, axes]) => {
    const [first] = axes
    const own = axes.some(axis => axis.machine.id === machineId)
    return first?.unit && own && axes.length > 1 ? [{ key, role: first.role, model: first.unit.model, axes: axes.toSorted(byTag) }] : []
  })
}

/** The buses that the axes of a machine hang on, each with all axes of the site that do; one alone has nobody to share with. */
export function busGroups(machineId: number, ofSite: readonly Axis[]): BusGroup[] {
  const own = new Set(ofSite.filter(axis => axis.machine.id === machineId && axis.bus !== '').map(axis => axis.bus))
  return [...own].sort().map(bus => ({ bus, axes: ofSite.filter(axis => axis.bus === bus).toSorted(byTag) })).filter(group => group.axes.length > 1)
}
