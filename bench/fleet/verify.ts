import { spawn } from 'node:child_process'
import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { atMost, type Figure } from '../figure'

const root = fileURLToPath(new URL('../..', import.meta.url))

export interface MeasuredVerify { readonly begunAt: string, readonly entries: number, readonly rows: number, readonly figures: readonly Figure[] }

/** `npm run verify` in a process of its own: the CPU that a thousand entries take, begin included; 200 ms are 5,000 a second, and the most memory that it held. */
export async function measureVerify(folder: string): Promise<MeasuredVerify> {
  const begunAt = new Date().toISOString()
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/commands/verify.ts', folder], { cwd: root, env: { ...process.env, TSX_TSCONFIG_PATH: 'scripts/tsconfig.json' }, stdio: ['ignore', 'pipe', 'inherit'] })
  let printed = ''
  child.stdout.on('data', (chunk: Buffer) => { printed += chunk.toString('utf8') })
  let [most, cpu] = [0, 0]
  const look = setInterval(() => {
    most = Math.max(most, residentMiB(child.pid))
    cpu = Math.max(cpu, cpuOf(child.pid))
  }, 50)
  const code = await new Promise(resolve => child.once('close', resolve))
  clearInterval(look)
  const [entries = 0, rows = 0] = /^(\d+) entries, (\d+) records/.exec(printed)?.slice(1).map(Number) ?? []
  if (code !== 0 || !(entries > 0)) throw new Error(`The vault is not sound: ${printed}`)
  const figures = [atMost(`verification of ${entries} entries and their rows, CPU for a thousand of them`, cpu / entries * 1000, 200, 'ms'), atMost(`verification of ${entries} entries, most memory`, most, 300, 'MiB')]
  return { begunAt, entries, rows, figures }
}

/** Memory that a process has had at its most, MiB; 0 where it has ended. */
function residentMiB(pid: number | undefined): number {
  try {
    return Number(/VmHWM:\s+(\d+) kB/.exec(readFileSync(`/proc/${pid}/status`, 'utf8'))?.[1] ?? 0) / 1024
  }
  catch {
    // It has ended between two looks.
    return 0
  }
}

/** CPU milliseconds of a process and its threads so far; the kernel counts in steps of 10. */
function cpuOf(pid: number | undefined): number {
  try {
    const fields = readFileSync(`/proc/${pid}/stat`, 'utf8').replace(/^.*\) /s, '').split(' ')
    return (Number(fields[11]) + Number(fields[12])) * 10
  }
  catch {
    // It has ended between two looks.
    return 0
  }
}
