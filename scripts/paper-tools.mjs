import { spawnSync } from 'node:child_process'
import { installDebian } from './debian.mjs'

const tools = [
  { command: 'pdftotext', ask: '-v', name: 'poppler-utils', why: 'The tests of sheets and labels read them with pdftotext and pdftoppm.' },
  { command: 'unzip', ask: '-v', name: 'unzip', why: 'The tests of kits and line folders open them with unzip.' },
]

/** Programs that read what the vault writes: found, or installed from Debian as root, or named. */
export function needPaperTools() {
  for (const { command, ask, name, why } of tools) {
    if (spawnSync(command, [ask]).error) installDebian(name, why, `Elsewhere: put ${command} on the path.`)
  }
}
