import { setImmediate } from 'node:timers/promises'
import { CodedError } from '#shared/errors/coded'
import { Refusal } from '#shared/errors/refusal'
import type { VaultActor } from '#server/database/actor'
import { readAxisPage, type AxisListRow } from '#server/database/axis-state/list'
import type { Vault } from '#server/database/client'
import { lineRows } from '#server/database/line/queries'
import { siteRows } from '#server/database/site/queries'
import { kitFiles, safeName } from '../kit/kit-files'
import { partsToKeep } from '../kit/kit-parts'
import { GrowingZip, type ZipFile } from '../paper/zip'
import { plantOf } from '../people/plant'
import { drawWords, sheetWords } from '../sheet/kit-sheet'
import { indexPage, type FolderAxis } from './index-page'

/*
 * Everything that it takes to restore the axes of a line without the vault: a ZIP for a memory stick or a shared folder.
 */

const maker: VaultActor = { kind: 'vault', name: 'line folder', sites: null, peer: '' }
const day = 86_400_000
const pageSize = 100

/** The ZIP of a line, part by part; other requests get their turn between two axes. `origin` is where people reach the vault. */
export async function* lineFolder(vault: Vault, lineId: number, origin: string): AsyncGenerator<Buffer> {
  const line = lineRows(vault.db).byId.get({ id: lineId })
  const site = line && siteRows(vault.db).byId.get({ id: line.siteId })
  if (!line || !site) throw new Refusal('not-found', `There is no line ${lineId}.`)
  const madeAt = vault.now()
  const zip = new GrowingZip(madeAt)
  const axes: FolderAxis[] = []
  for (const row of axesOf(vault, lineId)) {
    const { axis, files } = await folderAxis(vault, row, origin)
    axes.push(axis)
    for (const file of files) yield zip.add(file)
    await setImmediate()
  }
  const page = indexPage({ plant: plantOf(vault), site: site.name, line: line.name, timeZone: site.timeZone, madeAt, axes })
  yield zip.add({ name: 'index.html', bytes: Buffer.from(page, 'utf8'), packed: false })
  yield zip.end()
}

/** All axes of the line by their tags. */
export function axesOf({ db }: Vault, lineId: number): AxisListRow[] {
  const rows: AxisListRow[] = []
  for (let page = readAxisPage(db, null, { lineId }, 0, pageSize); page.length > 0; page = readAxisPage(db, null, { lineId }, page.at(-1)?.axis.id ?? 0, pageSize)) rows.push(...page)
  return rows.toSorted((a, b) => (a.axis.tag.toLowerCase() < b.axis.tag.toLowerCase() ? -1 : 1))
}

/** What an axis gives to the folder; where there is nothing to restore it stands in the list all the same, and says so. */
async function folderAxis(vault: Vault, row: AxisListRow, origin: string): Promise<{ axis: FolderAxis, files: readonly ZipFile[] }> {
  const { axis: { id, tag, role }, machine, unit } = row
  const known = { tag, role, machine: machine.name, unit: unit?.serial ?? 'none fitted' }
  try {
    const parts = partsToKeep(vault.db, maker, id, vault.now())
    const words = sheetWords(vault, parts, { origin })
    const { files, without } = kitFiles(vault, { ...parts, fitted: { ...parts.fitted, warnings: [] } })
    const folder = safeName(tag)
    const all = [{ name: 'sheet.pdf', bytes: await drawWords(words, parts, {}), packed: true }, ...files].map(file => ({ ...file, name: `${folder}/${file.name}` }))
    const { mark, version, now } = parts
    return {
      files: all,
      axis: {
        ...known, code: words.code, files: all.map(({ name }) => ({ path: name, words: name.slice(folder.length + 1) })), note: without.join(' '),
        knownGood: mark ? `v${version.number} by ${mark.by}, ${Math.floor((Date.parse(now) - Date.parse(mark.at)) / day)} d old` : `none: v${version.number}, the newest, is not released`,
      },
    }
  }
  catch (error) {
    if (!(error instanceof CodedError)) throw error
    return { files: [], axis: { ...known, code: '', knownGood: '', files: [], note: error.message } }
  }
}
