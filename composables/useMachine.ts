import type { Machine } from '#shared/api/places'
import type { Axis, VersionOne } from '#shared/api/versions'

export interface MachineAxis { readonly axis: Axis, readonly version: VersionOne | null }
export interface MachineView { readonly machine: Machine, readonly axes: readonly MachineAxis[] }

/** Reads a machine with its axes and what the drive of each holds today; at most 200 axes. */
export function useMachine(id: () => number) {
  const api = useApi()
  async function read(signal: AbortSignal): Promise<MachineView> {
    const [machine, { items }] = await Promise.all([
      api.get<Machine>(`/api/machines/${id()}`, { signal }),
      api.get<{ items: Axis[] }>('/api/axes', { query: { machineId: id(), limit: 200 }, signal }),
    ])
    const axes = await Promise.all(items.map(async axis => ({ axis, version: axis.current ? await api.get<VersionOne>(`/api/versions/${axis.current.versionId}`, { signal }) : null })))
    return { machine, axes }
  }
  return useRead(read, [id])
}
