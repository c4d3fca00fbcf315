import type { Vault } from '#server/database/client'
import { drawKitSheet, type SheetOptions } from '../sheet/kit-sheet'
import { zipOf } from '../paper/zip'
import { kitFiles, safeName } from './kit-files'
import type { KitParts } from './kit-parts'

/** Everything of a kit in one ZIP: the sheet, the values in every form that there is, the drive tool's own backup. */
export async function zipKit(vault: Vault, parts: KitParts, options: SheetOptions): Promise<Buffer> {
  const { files, without } = kitFiles(vault, parts)
  const sheet = await drawKitSheet(vault, parts, options)
  const tag = safeName(parts.place.axis.tag)
  const notes = without.length === 0 ? [] : [{ name: 'READ-THIS-FIRST.txt', bytes: Buffer.from(without.map(line => `${line}\r\n`).join(''), 'utf8'), packed: false }]
  return zipOf([...notes, { name: `1-${tag}-v${parts.version.number}-sheet.pdf`, bytes: sheet, packed: true }, ...files], parts.now)
}
