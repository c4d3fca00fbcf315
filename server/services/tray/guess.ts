import { diffContents } from '#shared/diff/diff'
import type { Content, SettingsFile } from '#shared/settings/types'
import { emptyContent } from '#shared/settings/content'
import { seesSite, type Actor } from '#server/database/actor'
import { readContent } from '#server/database/content/queries'
import { axesOfModel } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import { axisNamed } from '../uploads/axis-named'

export interface Guess { readonly axisId: number, readonly tag: string, readonly siteId: number, readonly why: string }

/** From this share of equal fields on, a content is taken for that of the axis. */
const alike = 0.95

/** The axis that the sender named; null where they named none that they can see. */
export function guessByTag(db: VaultDb, actor: Actor, ref: string | undefined): Guess | null {
  const named = ref === undefined ? undefined : axisNamed(db, ref)
  if (!named || !seesSite(actor, named.site.id)) return null
  return { axisId: named.axis.id, tag: named.axis.tag, siteId: named.site.id, why: 'named by the sender' }
}

/** The axis whose current content is the most alike, else the only one with the same node address; null where neither is there. */
export function guessAxis(db: VaultDb, actor: Actor, file: Pick<SettingsFile, 'unit'>, content: Content): Guess | null {
  const candidates = axesOfModel(db, file.unit.model, content.axisKind).filter(({ siteId }) => seesSite(actor, siteId))
    .map(({ contentId, ...axis }) => {
      const other = readContent(db, contentId)
      return { axis, share: equalShare(other, content), address: other.setup.nodeAddress }
    })
  const [best] = candidates.sort((a, b) => b.share - a.share)
  if (best && best.share >= alike) return { ...best.axis, why: `${Math.floor(best.share * 1000) / 10} % of the values are equal` }
  const { nodeAddress } = content.setup
  const sameAddress = nodeAddress ? candidates.filter(({ address }) => address === nodeAddress) : []
  const [only, second] = sameAddress
  return only && !second ? { ...only.axis, why: `same node address ${nodeAddress}` } : null
}

/** How many of the fields that either content holds are equal in both, 0 to 1; two empty contents are equal. */
export function equalShare(a: Content, b: Content): number {
  const changes = diffContents(a, b)
  const fields = diffContents(emptyContent(a.axisKind), a).length + changes.filter(({ before }) => before === undefined).length
  return fields === 0 ? 1 : 1 - changes.length / fields
}
