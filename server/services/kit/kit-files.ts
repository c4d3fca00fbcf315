import { quantity } from '#shared/checks/format'
import { CodedError } from '#shared/errors/coded'
import type { AxisKind } from '#shared/settings/types'
import type { CarryCase } from '#shared/swap/carried'
import { differingBases, ownFileFits } from '#shared/swap/rescale'
import { attachmentBytes, DamagedAttachment } from '#server/database/attachment/queries'
import type { Vault } from '#server/database/client'
import { listAttachments } from '../attachments/read-attachments'
import { textOf } from '../versions/version-file'
import type { ZipFile } from '../paper/zip'
import type { KitParts } from './kit-parts'

/** What the drive's own list would leave out is told, not passed over in silence. */
export interface KitFiles { readonly files: readonly ZipFile[], readonly without: readonly string[] }

/**
 * The files of a kit beside its sheet. The drive tool's own backups stand first where both units have one force base; else
 * last, in a folder whose name says stop: their percentages mean other newtons.
 */
export function kitFiles(vault: Vault, { file, version, fitted, place }: KitParts): KitFiles {
  const name = `${safeName(place.axis.tag)}-v${version.number}`
  const text = (form: 'json' | 'csv') => Buffer.from(textOf(vault.db, file, form), 'utf8')
  const list = ownList(vault, file)
  const values: ZipFile[] = [
    { name: `2-${name}-kit.json`, bytes: text('json'), packed: false },
    { name: `3-${name}-kit.csv`, bytes: text('csv'), packed: false },
    ...(list.bytes ? [{ name: `4-${name}-kit-list.csv`, bytes: list.bytes, packed: false }] : []),
  ]
  const stop = fitted.carry && !ownFileFits(fitted.carry) ? stopOf(fitted.carry, place.axis.axisKind) : null
  const attached = attachmentsOf(vault, version.id, stop ? stop.folder : `0-own-backup-of-${safeName(version.file.unit.serial)}`)
  return {
    files: stop ? [...values, ...attached.files] : [...attached.files, ...values],
    without: [...(stop && attached.files.length > 0 ? [stop.words] : []), ...(list.why === null ? [] : [list.why]), ...attached.damaged, ...fitted.warnings],
  }
}

/** Why the drive tool's own file must not go into the new unit, in a folder's name and in a sentence. */
function stopOf({ out, into }: CarryCase, axisKind: AxisKind): { folder: string, words: string } {
  const bases = differingBases(out, into)
  const [from, to] = [bases?.from, bases?.to].map(base => (base === undefined ? '' : quantity(base, axisKind === 'linear' ? 'N' : 'N·m')))
  return bases
    ? { folder: `9-STOP-values-of-${safeName(out.model)}-mean-other-newtons`, words: `Do not load the drive tool’s own file: 100 % in it means ${from} on ${out.model}, and ${to} on ${into.model}. Write the kit instead.` }
    : { folder: `9-STOP-values-of-${safeName(out.model)}-may-mean-other-newtons`, words: `Do not load the drive tool’s own file: it is of ${out.model}, and what 100 % of force means on ${into.model} is not known from both nameplates. Write the kit instead.` }
}

function ownList({ db }: Vault, file: KitParts['file']): { bytes: Buffer | null, why: string | null } {
  try {
    return { bytes: Buffer.from(textOf(db, file, 'entry'), 'utf8'), why: null }
  }
  catch (error) {
    if (!(error instanceof CodedError) || (error.code !== 'no-entry-table' && error.code !== 'entry-table-unfit')) throw error
    return { bytes: null, why: error.code === 'no-entry-table' ? null : error.message }
  }
}

/** Backups that are as they came in. One that was damaged is left out and named: at night the rest is needed all the same. */
function attachmentsOf({ db }: Vault, versionId: number, folder: string): { files: ZipFile[], damaged: string[] } {
  const files: ZipFile[] = []
  const damaged: string[] = []
  for (const one of listAttachments(db, versionId).items) {
    if (one.kind !== 'drive-backup') continue
    try {
      files.push({ name: `${folder}/${one.id}-${safeName(one.name)}`, bytes: Buffer.concat([...attachmentBytes(db, one)]), packed: true })
    }
    catch (error) {
      if (!(error instanceof DamagedAttachment)) throw error
      damaged.push(`The attached ${one.name} is left out: ${error.message}`)
    }
  }
  return { files, damaged }
}

/** A file name that opens on every system, old unpackers too: letters without their accents, the rest an underscore. */
export const safeName = (text: string): string => text.normalize('NFKD').replaceAll(/\p{M}/gu, '').replaceAll(/[^A-Za-z0-9._-]/g, '_').replaceAll(/^\.+/g, '_').slice(0, 100) || '_'
