import { answers } from '../answers'
import { inWords } from '../format'
import { atSetup } from '../pointers'
import type { LiveResult } from './types'

const { stop, unknown } = answers('address-twice')

/** An axis on a bus of one site. */
export interface BusAxis {
  readonly tag: string
  /** Serial of its drive: the channels of one drive share its address. */
  readonly drive?: string
  readonly nodeAddress?: number
}

export const addressTwice = {
  id: 'address-twice',
  title: 'Addresses on a bus',
  reason: 'Of two drives with one address neither can be told what to do for certain, and either may answer for the other.',
  formula: 'nodeAddress of two axes on one bus in a site, 0 (unset) and the channels of one drive aside',
  levels: ['stop', 'unknown'],
  judge,
} as const

/** Judges all axes of one bus in a site; axes alone on their bus have nobody to share with. */
function judge(axes: readonly BusAxis[]): LiveResult[] {
  const at = [atSetup('nodeAddress')]
  const byAddress = new Map<number, BusAxis[]>()
  for (const axis of axes) {
    const { nodeAddress } = axis
    // 0 is no address: such a drive does not take part.
    if (nodeAddress !== undefined && nodeAddress !== 0) byAddress.set(nodeAddress, [...byAddress.get(nodeAddress) ?? [], axis])
  }
  const twice = [...byAddress].filter(([, sharing]) => drivesOf(sharing) > 1).sort(([one], [other]) => one - other)
  const results = twice.map(([nodeAddress, sharing]) => {
    const tags = sharing.map(({ tag }) => tag)
    return { ...stop(at, `${inWords(tags)} answer to one address on this bus: ${nodeAddress}.`, { nodeAddress, axes: tags }), axes: tags }
  })
  const silent = axes.filter(({ nodeAddress }) => nodeAddress === undefined).map(({ tag }) => tag)
  if (silent.length === 0 || axes.length < 2) return results
  return [...results, { ...unknown(`Whether ${inWords(silent)} ${silent.length === 1 ? 'shares' : 'share'} an address on this bus`, ['nodeAddress'], at, { axes: silent }), axes: silent }]
}

/** An axis whose drive is not known counts as a drive of its own. */
function drivesOf(axes: readonly BusAxis[]): number {
  return new Set(axes.map(({ drive, tag }) => drive === undefined ? `tag ${tag}` : `drive ${drive}`)).size
}
