import { randomUUID } from 'node:crypto'
import { createReadStream, existsSync, mkdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { open } from 'node:fs/promises'
import { join } from 'node:path'
import { z } from 'zod'
import { folderStatus, type FolderStatus } from '#shared/api/line-folders'
import { Refusal } from '#shared/errors/refusal'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { boundsText } from '#server/database/bounds'
import { lineFolderRows, lineRows } from '#server/database/line/queries'
import { axesOf, lineFolder } from './line-folder'

/** What is told beside a kept folder. */
const told = z.object({ kept: folderStatus.shape.kept, failed: folderStatus.shape.failed })
type Told = z.infer<typeof told>
const nothing: Told = { kept: null, failed: null }

/** Where the folders of each night lie; another place, a network share, may be set. */
export const foldersIn = (vault: Vault): string => process.env.WITNESSMARK_LINE_FOLDERS ?? join(vault.folder, 'line-folders')

const zipPath = (folder: string, lineId: number) => join(folder, `line-${lineId}.zip`)
const toldPath = (folder: string, lineId: number) => join(folder, `line-${lineId}.json`)

function readTold(folder: string, lineId: number): Told {
  const path = toldPath(folder, lineId)
  if (!existsSync(path) || !existsSync(zipPath(folder, lineId))) return existsSync(path) ? { ...told.parse(JSON.parse(readFileSync(path, 'utf8'))), kept: null } : nothing
  return told.parse(JSON.parse(readFileSync(path, 'utf8')))
}

/** What is known of the kept folder of a line. */
export const readKept = (vault: Vault, lineId: number): Told => readTold(foldersIn(vault), lineId)

function writeTold(folder: string, lineId: number, words: Told): void {
  const path = toldPath(folder, lineId)
  writeFileSync(`${path}.part`, JSON.stringify(words))
  renameSync(`${path}.part`, path)
}

/** Writes the ZIP of a line to a new file and answers its size; nothing is left of one that fails. */
async function writeFolder(vault: Vault, lineId: number, origin: string, path: string): Promise<number> {
  const file = await open(path, 'w', 0o600)
  try {
    for await (const part of lineFolder(vault, lineId, origin)) await file.writeFile(part)
    await file.sync()
  }
  catch (error) {
    rmSync(path, { force: true })
    throw error
  }
  finally {
    await file.close()
  }
  return statSync(path).size
}

/** Makes the folder of a line anew and puts it in the place of the one before, all at once. Where that fails the one before stays, and why is told. */
export async function keepFolder(vault: Vault, lineId: number, origin: string): Promise<Told> {
  const folder = foldersIn(vault)
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  const before = readTold(folder, lineId)
  try {
    const madeAt = vault.now()
    const part = `${zipPath(folder, lineId)}.part`
    const bytes = await writeFolder(vault, lineId, origin, part)
    renameSync(part, zipPath(folder, lineId))
    const words = { kept: { madeAt, bytes, axes: axesOf(vault, lineId).length }, failed: null }
    writeTold(folder, lineId, words)
    return words
  }
  catch (error) {
    const words = { ...before, failed: { at: vault.now(), problem: error instanceof Error ? error.message : 'It broke off.' } }
    writeTold(folder, lineId, words)
    return words
  }
}

/** A folder on its way out. */
export interface FolderFile { readonly chunks: AsyncIterable<Buffer>, readonly size: number, readonly name: string }

/** The folder of last night, or one that is made now and gone when it is sent. */
export async function folderFile(vault: Vault, lineId: number, kept: boolean, origin: string): Promise<FolderFile> {
  const line = lineRows(vault.db).byId.get({ id: lineId })
  const name = `${(line?.name ?? `line-${lineId}`).replaceAll(/[^A-Za-z0-9._-]+/g, '-')}-line-folder.zip`
  if (kept) {
    const path = zipPath(foldersIn(vault), lineId)
    if (!existsSync(path)) throw new Refusal('not-found', 'No folder of this line was kept yet: the first is made tonight. Take one that is made now.')
    return { chunks: createReadStream(path) as AsyncIterable<Buffer>, size: statSync(path).size, name }
  }
  const path = join(vault.folder, `folder-${lineId}-${randomUUID()}.part`)
  const size = await writeFolder(vault, lineId, origin, path)
  return { chunks: readOnce(path), size, name }
}

/** The file is taken away when it is read to its end, or when nobody reads on. */
async function* readOnce(path: string): AsyncGenerator<Buffer> {
  try {
    yield* createReadStream(path) as AsyncIterable<Buffer>
  }
  finally {
    rmSync(path, { force: true })
  }
}

/** Each line of the actor's sites with its kept folder. */
export function listFolders(vault: Vault, actor: Actor): { items: FolderStatus[] } {
  const folder = foldersIn(vault)
  return {
    items: lineFolderRows(vault.db).all.all({ sites: boundsText(actor.sites) }).map(({ id, name, site, timeZone, axes }) => ({ lineId: id, line: name, site, timeZone, axes, ...readTold(folder, id) })),
  }
}
