import { spawn, type ChildProcess } from 'node:child_process'
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { createServer, type AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join, resolve } from 'node:path'

const entry = resolve('.output/server/index.mjs')
export const admin = { email: 'ines.okafor@larkfield.example', password: 'copper kettle under the stairs' }

interface Reply { readonly status: number, readonly text: string, readonly cookie: string | undefined }

/** The built server on a vault of its own, and what a bench needs to have registered in it. */
export class BuiltServer {
  private readonly folder: string
  private child: ChildProcess | undefined
  private port = 0

  /** On an empty vault that goes with it, or on one that is there and stays. */
  constructor(private readonly kept?: string) {
    this.folder = kept ?? mkdtempSync(join(tmpdir(), 'witnessmark-bench-'))
  }

  async start(): Promise<void> {
    if (!existsSync(entry)) throw new Error('There is no built server: run npm run build first.')
    this.port = await freePort()
    this.child = spawn(process.execPath, [entry], {
      env: { PATH: process.env.PATH, PORT: String(this.port), NITRO_HOST: '127.0.0.1', WITNESSMARK_DATA: this.folder, WITNESSMARK_ADMIN_EMAIL: admin.email, WITNESSMARK_ADMIN_PASSWORD: admin.password },
      stdio: ['ignore', 'pipe', 'ignore'],
    })
    let printed = ''
    this.child.stdout?.on('data', (chunk: Buffer) => { printed += chunk.toString('utf8') })
    const ready = () => this.kept === undefined ? printed.includes('administrator registered') : this.answers()
    for (let attempt = 0; attempt < 2000; attempt += 1) {
      if (await ready()) return
      await new Promise(resolve => setTimeout(resolve, 10))
    }
    throw new Error(`The server did not come up: ${printed}`)
  }

  private async answers(): Promise<boolean> {
    try {
      return (await fetch(`${this.origin}/api/health`)).status > 0
    }
    catch {
      // Nobody listens there yet.
      return false
    }
  }

  /** CPU time of the server so far, all its threads, in milliseconds; the kernel counts in steps of 10. */
  cpu(): number {
    const fields = readFileSync(`/proc/${this.child?.pid}/stat`, 'utf8').replace(/^.*\) /s, '').split(' ')
    return (Number(fields[11]) + Number(fields[12])) * 10
  }

  get origin(): string {
    return `http://127.0.0.1:${this.port}`
  }

  private async post(path: string, cookie: string, body: object): Promise<Reply> {
    const answer = await fetch(this.origin + path, { method: 'POST', headers: { 'content-type': 'application/json', ...(cookie === '' ? {} : { cookie }) }, body: JSON.stringify(body) })
    return { status: answer.status, text: await answer.text(), cookie: answer.headers.getSetCookie().at(-1)?.replace(/;.*$/s, '') }
  }

  async signIn(email = admin.email): Promise<string> {
    const { cookie, text } = await this.post('/api/sign-in', '', { email, password: admin.password })
    if (cookie === undefined) throw new Error(`No sign-in: ${text}`)
    return cookie
  }

  async made(path: string, cookie: string, body: object): Promise<number> {
    const { status, text } = await this.post(path, cookie, body)
    if (status !== 201) throw new Error(`${path} answered ${status}: ${text}`)
    return (JSON.parse(text) as { id: number }).id
  }

  /** Registers a planner and an axis with a unit of this serial; answers the planner's cookie. */
  async withAxis(serial: string): Promise<string> {
    const email = 'runa.haldersen@larkfield.example'
    await this.made('/api/people', await this.signIn(), { name: 'Runa Haldersen', email, roles: ['planner'], siteIds: [], password: admin.password })
    const cookie = await this.signIn(email)
    const siteId = await this.made('/api/sites', cookie, { name: 'Larkfield Preserves', timeZone: 'Europe/Copenhagen' })
    const lineId = await this.made('/api/lines', cookie, { siteId, name: 'Jar line 1' })
    const machineId = await this.made('/api/machines', cookie, { lineId, name: 'Lid press 2' })
    const axisId = await this.made('/api/axes', cookie, { machineId, tag: 'LID-02.Z', axisKind: 'linear' })
    const unitId = await this.made('/api/units', cookie, { serial, model: 'HL40-200V' })
    await this.made('/api/fittings', cookie, { axisId, unitId, at: '2020-01-01T00:00:00Z' })
    return cookie
  }

  stop(): void {
    this.child?.kill(this.kept === undefined ? 'SIGKILL' : 'SIGTERM')
    if (this.kept === undefined) rmSync(this.folder, { recursive: true, force: true })
  }
}

function freePort(): Promise<number> {
  return new Promise((resolve) => {
    const probe = createServer()
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as AddressInfo
      probe.close(() => resolve(port))
    })
  })
}
