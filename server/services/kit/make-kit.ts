import type { z } from 'zod'
import type { kitBody } from '#shared/api/versions'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import { knownGoodQueries } from '#server/database/known-good/queries'
import type { VaultDb } from '#server/database/prepared'
import type { NameplateRow, UnitRow, VersionRow } from '#server/database/schema'
import { unitRows } from '#server/database/unit/queries'
import { versionQueries } from '#server/database/version/queries'
import { seesSite } from '#server/database/actor'
import { fileOf, versionRow } from '../versions/read-version'
import { fileEnds, mediaTypes, textOf, type HandedOut } from '../versions/version-file'
import { asItStands, fitToUnit } from './fit'
import { kitFile, kitNote, type KitSource } from './kit-file'

export interface Kit extends Omit<HandedOut, 'etag'> {
  /** false: no version is known-good, the newest one is given out. */
  readonly released: boolean
}

/**
 * The values that an axis is restored to, as a file for a replacement unit: fitted to a registered one, as they stand for
 * another serial, with the serial to be written where none is named. Logged.
 */
export function makeKit(vault: Vault, actor: PersonActor, axisId: number, { serial, form, cautionsRead }: z.output<typeof kitBody>): Kit {
  if (!cautionsRead) throw new Refusal('cautions-unread', 'Read the cautions, then take the kit: these values move a machine.')
  return vault.write(actor, (write) => {
    const { db } = vault
    const place = judgingQueries(db).axis.get({ id: axisId })
    if (!place) throw new Refusal('not-found', 'There is no such axis.')
    const { version, mark } = toRestore(db, axisId)
    const source = kitSource(db, version)
    const registered = registeredUnit(db, actor, serial, version.file.unit.channel)
    const fitted = registered ? fitToUnit(db, place, source, registered, write.now) : asItStands(source, version.file.unit, serial)
    const note = kitNote({ tag: place.axis.tag, number: version.number, mark, left: fitted.left, warnings: fitted.warnings })
    const file = kitFile(fitted.content, fitted.identity, note, write.now, actor.name)
    write.log({ act: 'kit-taken', id: axisId, state: { axisId, versionId: version.id, serial: serial ?? null, unitId: registered?.id ?? null, form, released: mark !== null, left: [...fitted.left] } })
    return { bytes: Buffer.from(textOf(db, file, form), 'utf8'), mediaType: mediaTypes[form], name: `${place.axis.tag}-v${version.number}-kit${fileEnds[form]}`, released: mark !== null }
  })
}

/** The known-good in force, else the newest version that is not void. */
function toRestore(db: VaultDb, axisId: number): { version: VersionRow, mark: { by: string, at: string } | null } {
  const inForce = knownGoodQueries(db).inForce.get({ axisId })
  if (inForce?.mark.versionId) return { version: versionRow(db, inForce.mark.versionId), mark: { by: inForce.by, at: inForce.mark.at } }
  const newest = versionQueries(db).current.get({ axisId })
  if (!newest) throw new Refusal('no-known-good', 'This axis was never read: there is nothing to restore. Upload a file of its unit first.')
  return { version: newest, mark: null }
}

function kitSource(db: VaultDb, version: VersionRow): KitSource {
  const nameplate = newestNameplate(db, unitRows(db).byId.get({ id: version.unitId })?.model ?? version.model)
  const { axisKind, setup, zones, moves, extra } = fileOf(db, version)
  return {
    content: { axisKind, setup, zones, moves, extra }, model: version.model,
    ...(version.firmware === null ? {} : { firmware: version.firmware }), ...(nameplate ? { nameplate: nameplate.nameplate } : {}),
  }
}

const newestNameplate = (db: VaultDb, model: string): NameplateRow | undefined => judgingQueries(db).nameplate.get({ model })

/** The unit of this serial, on the channel that the axis had; units of other sites are as unknown as those not registered. */
function registeredUnit(db: VaultDb, actor: PersonActor, serial: string | undefined, channel: number | undefined): UnitRow | undefined {
  const unit = serial === undefined ? undefined : unitRows(db).bySerial.get({ serial, channel: channel ?? 0 })
  return unit && (unit.siteId === null || seesSite(actor, unit.siteId)) ? unit : undefined
}
