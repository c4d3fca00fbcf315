import { closeSync, fsyncSync, mkdirSync, openSync, renameSync, writeSync } from 'node:fs'
import { join } from 'node:path'
import { PostError, type Post } from './post'
import { composed } from './message'

/** Writes each letter as one file; the same letter over itself, so that none is there twice. */
export function folderPost(dataFolder: string, from: string): Post {
  const folder = join(dataFolder, 'letters')
  return {
    way: 'folder', from,
    send: async (message) => {
      const bytes = await composed(message, from)
      try {
        mkdirSync(folder, { recursive: true, mode: 0o700 })
        writeWhole(join(folder, `${message.madeAt.slice(0, 10)}-${message.id}.eml`), bytes)
      }
      catch (error) {
        throw new PostError('unreachable', `The file could not be written: ${error instanceof Error ? error.message : String(error)}`)
      }
    },
    close: () => undefined,
  }
}

/** Under its name there is never half a file. */
function writeWhole(path: string, bytes: Buffer): void {
  const file = openSync(`${path}.part`, 'w', 0o600)
  try {
    writeSync(file, bytes)
    fsyncSync(file)
  }
  finally {
    closeSync(file)
  }
  renameSync(`${path}.part`, path)
}
