import type { z } from 'zod'
import type { kitBody } from '#shared/api/versions'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { swapQueries } from '#server/database/swap/queries'
import { fileEnds, mediaTypes, textOf, type HandedOut } from '../versions/version-file'
import { drawKitSheet } from '../sheet/kit-sheet'
import { kitParts, type KitParts } from './kit-parts'
import { zipKit } from './zip-kit'

export interface Kit extends Omit<HandedOut, 'etag'> {
  /** false: no version is known-good, the newest one is given out. */
  readonly released: boolean
}
type Wanted = z.output<typeof kitBody>
type TextForm = Exclude<Wanted['form'], 'pdf' | 'zip'>
/** A kit that is made and not yet taken. */
export interface MadeKit { readonly kit: Kit, readonly parts: KitParts, readonly form: Wanted['form'] }

/**
 * The values that an axis is restored to, for a replacement unit: fitted to a registered one, as they stand for another serial,
 * with the serial to be written where none is named. Logs nothing yet: a PDF takes longer than a write may. `origin` is where
 * people reach the vault.
 */
export async function makeKit(vault: Vault, actor: PersonActor, axisId: number, wanted: Wanted, origin: string): Promise<MadeKit> {
  const { form, paper } = wanted
  if (form !== 'pdf' && form !== 'zip') return makeTextKit(vault, actor, axisId, { ...wanted, form })
  const parts = partsOf(vault, actor, axisId, wanted)
  const draw = form === 'pdf' ? drawKitSheet : zipKit
  return made(parts, form, { bytes: await draw(vault, parts, { origin, paper }), mediaType: form === 'pdf' ? 'application/pdf' : 'application/zip', name: `${nameOf(parts)}.${form}` })
}

/** As makeKit, in one of the forms that are read back. */
export function makeTextKit(vault: Vault, actor: PersonActor, axisId: number, wanted: Wanted & { readonly form: TextForm }): MadeKit {
  const parts = partsOf(vault, actor, axisId, wanted)
  const { form } = wanted
  return made(parts, form, { bytes: Buffer.from(textOf(vault.db, parts.file, form), 'utf8'), mediaType: mediaTypes[form], name: nameOf(parts) + fileEnds[form] })
}

function partsOf(vault: Vault, actor: PersonActor, axisId: number, { serial, cautionsRead }: Wanted): KitParts {
  if (!cautionsRead && !swapQueries(vault.db).openAtAxis.get({ axisId })?.facts.cautions) throw new Refusal('cautions-unread', 'Read the cautions, then take the kit: these values move a machine.')
  return kitParts(vault.db, actor, axisId, serial, vault.now())
}

const nameOf = ({ place, version }: KitParts) => `${place.axis.tag}-v${version.number}-kit`
const made = (parts: KitParts, form: Wanted['form'], file: Omit<Kit, 'released'>): MadeKit => ({ parts, form, kit: { ...file, released: parts.mark !== null } })

/** Logs that a kit was taken, and hands it out. */
export function takeKit(vault: Vault, actor: PersonActor, { kit, parts: { place, version, serial, unit, fitted }, form }: MadeKit): Kit {
  return vault.write(actor, (write) => {
    const axisId = place.axis.id
    write.log({ act: 'kit-taken', id: axisId, state: { axisId, versionId: version.id, serial, unitId: unit?.id ?? null, form, released: kit.released, left: [...fitted.left] } })
    return kit
  })
}
