import type { Nameplate } from '#shared/settings/nameplate'
import type { Content } from '#shared/settings/types'

/** Where the hard stops lie; undefined unless the axis homes against one of them and the stroke of its model is known. */
export function hardStopsOf(content: Content, nameplate?: Nameplate): { readonly low: number, readonly high: number } | undefined {
  const { homingMethod, homingDirection, homeOffset } = content.setup
  if (!nameplate || homingMethod !== 'hard-stop' || homingDirection === undefined || homeOffset === undefined) return undefined
  const home = nameplate.homeOffsetSense === 'home-reads-offset' ? homeOffset : 0 - homeOffset
  const reach = nameplate.stroke + 2 * (nameplate.hardMargin ?? 0)
  return homingDirection === 'negative' ? { low: home, high: home + reach } : { low: home - reach, high: home }
}
