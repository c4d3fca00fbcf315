import jsQR from 'jsqr'
import { spawnSync } from 'node:child_process'
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { PNG } from 'pngjs'

/*
 * Papers as others read them: pdftotext and pdftoppm (poppler-utils), unzip. `npm test` installs them where they are missing.
 */

function run(command: string, parameters: readonly string[], input?: Buffer): Buffer {
  const { status, stdout, stderr, error } = spawnSync(command, parameters, { input, env: { ...process.env, LC_ALL: 'C.UTF-8' }, maxBuffer: 256 * 1024 * 1024 })
  if (error) throw new Error(`${command} is not there: install poppler-utils and unzip. ${error.message}`)
  if (status !== 0) throw new Error(`${command} ended with ${status}: ${stderr.toString('utf8')}`)
  return stdout
}

function inFolder<Answer>(work: (folder: string) => Answer): Answer {
  const folder = mkdtempSync(join(tmpdir(), 'witnessmark-paper-'))
  try {
    return work(folder)
  }
  finally {
    rmSync(folder, { recursive: true })
  }
}

/** The text of a PDF as it stands on the paper, a form feed between pages. */
export const pdfText = (pdf: Buffer): string => run('pdftotext', ['-layout', '-', '-'], pdf).toString('utf8')

/** Each word of a page with the middle of its width and its lower edge, in points from the upper left corner. */
export function pdfWords(pdf: Buffer, page: number): { text: string, x: number, y: number }[] {
  const told = run('pdftotext', ['-bbox', '-f', String(page), '-l', String(page), '-', '-'], pdf).toString('utf8')
  return [...told.matchAll(/<word xMin="([\d.]+)" yMin="[\d.]+" xMax="([\d.]+)" yMax="([\d.]+)">([^<]*)</g)]
    .map(([, from, to, y, text = '']) => ({ text, x: (Number(from) + Number(to)) / 2, y: Number(y) }))
}

/** Width and height of each page in points. */
export function pageSizes(pdf: Buffer): [number, number][] {
  return inFolder((folder) => {
    const path = join(folder, 'paper.pdf')
    writeFileSync(path, pdf)
    const told = run('pdfinfo', ['-f', '1', '-l', '9999', path]).toString('utf8')
    return [...told.matchAll(/^Page\s+\d+ size:\s+([\d.]+) x ([\d.]+)/gm)].map(match => [Number(match[1]), Number(match[2])])
  })
}

/** What the first QR code on a page says, read from the page rendered at so many dots an inch; null where none is found. */
export function qrOf(pdf: Buffer, page = 1, dpi = 150): string | null {
  return inFolder((folder) => {
    const path = join(folder, 'paper.pdf')
    writeFileSync(path, pdf)
    run('pdftoppm', ['-r', String(dpi), '-f', String(page), '-l', String(page), '-png', path, join(folder, 'page')])
    const [name = ''] = readdirSync(folder).filter(each => each.endsWith('.png'))
    const { data, width, height } = PNG.sync.read(readFileSync(join(folder, name)))
    return jsQR(new Uint8ClampedArray(data), width, height)?.data ?? null
  })
}

/** Unpacked by unzip: files by their path. */
export function unzipped(zip: Buffer): Map<string, Buffer> {
  return inFolder((folder) => {
    writeFileSync(join(folder, 'all.zip'), zip)
    run('unzip', ['-q', join(folder, 'all.zip'), '-d', join(folder, 'out')])
    const files = readdirSync(join(folder, 'out'), { recursive: true, withFileTypes: true }).filter(entry => entry.isFile())
    return new Map(files.map(({ name, parentPath }) => [join(parentPath, name).slice(folder.length + 5), readFileSync(join(parentPath, name))]))
  })
}
