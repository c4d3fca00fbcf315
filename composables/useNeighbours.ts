import { addressTwice } from '#shared/checks/live/address-twice'
import { sisterMatrix, sisterOutlier, type SisterRow } from '#shared/checks/live/sister-outlier'
import type { LiveResult } from '#shared/checks/live/types'
import type { JudgingContext } from '#shared/api/uploads'
import type { Axis, VersionOne } from '#shared/api/versions'
import type { Content } from '#shared/settings/types'
import { busGroups, sisterGroups, type BusGroup, type SisterGroup } from '~/utils/machine/sisters'
import { storedContent } from '~/utils/stored-content'
import type { MachineView } from './useMachine'

interface Page { readonly items: readonly Axis[], readonly next: string | null }
export interface SistersRead extends SisterGroup { readonly rows: readonly SisterRow[], readonly results: readonly LiveResult[] }
export interface BusRead extends BusGroup { readonly results: readonly LiveResult[] }
export interface Neighbours { readonly sisters: readonly SistersRead[], readonly buses: readonly BusRead[] }

/** Reads what the axes of a machine have to be held against in their site: its sister axes, and who shares its buses. */
export function useNeighbours(view: () => MachineView) {
  const api = useApi()

  async function axesOf(siteId: number, signal: AbortSignal): Promise<Axis[]> {
    const axes: Axis[] = []
    let cursor: string | undefined
    do {
      const page = await api.get<Page>('/api/axes', { query: { siteId, limit: 200, cursor }, signal })
      axes.push(...page.items)
      cursor = page.next ?? undefined
    } while (cursor !== undefined)
    return axes
  }

  /** What the drives hold, each version asked for once however many groups an axis is in. */
  function reader(signal: AbortSignal): (axis: Axis) => Promise<Content | undefined> {
    const held = new Map(view().axes.flatMap(({ version }) => version ? [[version.id, Promise.resolve(storedContent(version.content))]] : []))
    return async ({ current }) => {
      if (!current) return undefined
      const reading = held.get(current.versionId) ?? api.get<VersionOne>(`/api/versions/${current.versionId}`, { signal }).then(version => storedContent(version.content))
      held.set(current.versionId, reading)
      return reading
    }
  }

  async function read(signal: AbortSignal): Promise<Neighbours> {
    const { machine, axes } = view()
    const siteId = axes[0]?.axis.site.id
    if (siteId === undefined) return { sisters: [], buses: [] }
    const ofSite = await axesOf(siteId, signal)
    const contentOf = reader(signal)
    const sisters = await Promise.all(sisterGroups(machine.id, ofSite).map(async (group): Promise<SistersRead> => {
      const unit = group.axes[0]?.unit
      const [contents, context] = await Promise.all([
        Promise.all(group.axes.map(contentOf)),
        api.get<JudgingContext>('/api/judging-context', { query: { serial: unit?.serial, channel: unit?.channel ?? undefined }, signal }),
      ])
      const alike = group.axes.flatMap(({ tag, flags }, index) => {
        const content = contents[index]
        return content ? [{ tag, flags, content }] : []
      })
      const dictionary = context.nameplate?.dictionary
      return { ...group, rows: sisterMatrix(alike, dictionary), results: sisterOutlier.judge(alike, dictionary) }
    }))
    const buses = await Promise.all(busGroups(machine.id, ofSite).map(async (group): Promise<BusRead> => {
      const contents = await Promise.all(group.axes.map(contentOf))
      const onBus = group.axes.map(({ tag, unit }, index) => {
        const nodeAddress = contents[index]?.setup.nodeAddress
        return { tag, ...(unit && { drive: unit.serial }), ...(nodeAddress !== undefined && { nodeAddress }) }
      })
      return { ...group, results: addressTwice.judge(onBus) }
    }))
    return { sisters, buses }
  }

  return useRead(read, [view])
}
