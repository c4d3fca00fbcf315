import { spawn, type ChildProcess } from 'node:child_process'
import { existsSync, mkdtempSync, rmSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import type { z } from 'zod'
import { problemSchema, type Role } from '../../shared/api/common'
import { matchRoute } from '../../shared/api/match'
import { routes, type RouteDeclaration } from '../../shared/api/routes'
import { testScryptCost } from './vault'

const entry = fileURLToPath(new URL('../../.output/server/index.mjs', import.meta.url))

export const admin = { email: 'ines.okafor@larkfield.example', password: 'copper kettle under the stairs' }
/** One person a role, as in the demo plant; all with one password, to keep tests short. */
export const people = {
  technician: { name: 'Tobias Achterberg', email: 'tobias.achterberg@larkfield.example' },
  planner: { name: 'Runa Haldersen', email: 'runa.haldersen@larkfield.example' },
  auditor: { name: 'Maud Verhagen', email: 'maud.verhagen@larkfield.example' },
  admin: { name: 'ines.okafor', email: admin.email },
} as const satisfies Record<Role, { name: string, email: string }>

export interface CallOptions {
  readonly body?: unknown
  /** Sent as they are; `content-type` then comes with `headers`. */
  readonly raw?: string | Buffer | FormData
  /** Cookie, or a token that begins with wm_. */
  readonly as?: string | undefined
  readonly headers?: Readonly<Record<string, string>>
}
// The tests look into answers of every route; what shape they have, `call` has checked against the table.
export interface Reply { readonly status: number, readonly headers: Headers, readonly text: string, readonly json: Record<string, never> & { code?: string } }

export interface TestServer {
  readonly url: string
  readonly folder: string
  /** Standard output so far. */
  readonly output: () => string
  readonly call: (method: string, path: string, options?: CallOptions) => Promise<Reply>
  /** Cookie of the one person of that role, or of whoever has the e-mail. */
  readonly signIn: (who: Role | { email: string, password: string, panel?: boolean }) => Promise<string>
  readonly stop: (signal?: NodeJS.Signals) => Promise<void>
}

export interface ServerOptions {
  readonly env?: Readonly<Record<string, string>>
  /** Keeps the vault of an earlier server; a new one otherwise, removed at the end. */
  readonly folder?: string
  /** Registers one person a role; true unless the folder is given. */
  readonly seeded?: boolean
}

async function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer()
    probe.on('error', reject)
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as { port: number }
      probe.close(() => resolve(port))
    })
  })
}

/** Starts the built server on a free port; `nuxt build` comes first. */
export async function startServer({ env = {}, folder: given, seeded = given === undefined }: ServerOptions = {}): Promise<TestServer> {
  if (!existsSync(entry)) throw new Error('There is no built server: run npm run build first.')
  const folder = given ?? mkdtempSync(join(tmpdir(), 'witnessmark-server-'))
  const port = await freePort()
  const url = `http://127.0.0.1:${port}`
  const child = spawn(process.execPath, [entry], {
    env: {
      PATH: process.env.PATH, PORT: String(port), NITRO_HOST: '127.0.0.1', WITNESSMARK_DATA: folder, WITNESSMARK_SCRYPT_COST: String(testScryptCost),
      WITNESSMARK_ADMIN_EMAIL: admin.email, WITNESSMARK_ADMIN_PASSWORD: admin.password, ...env,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let printed = ''
  for (const stream of [child.stdout, child.stderr]) stream.on('data', (chunk: Buffer) => { printed += chunk.toString('utf8') })
  const server = clientOf(url, folder, () => printed, child, given === undefined)
  await untilReady(url, child, () => printed)
  if (seeded) await registerPeople(server)
  return server
}

async function untilReady(url: string, child: ChildProcess, output: () => string): Promise<void> {
  for (let attempt = 0; attempt < 200; attempt += 1) {
    if (child.exitCode !== null) throw new Error(`The server ended with ${child.exitCode}: ${output()}`)
    const answered = await fetch(`${url}/api/health`).then(answer => answer.ok, () => false)
    if (answered && /administrator registered|Set up the vault|vault open/.test(output())) return
    await new Promise(resolve => setTimeout(resolve, 50))
  }
  throw new Error(`The server did not answer: ${output()}`)
}

function clientOf(url: string, folder: string, output: () => string, child: ChildProcess, ours: boolean): TestServer {
  async function call(method: string, path: string, { body, raw, as, headers = {} }: CallOptions = {}): Promise<Reply> {
    const sent = raw ?? (body === undefined ? undefined : JSON.stringify(body))
    const answer = await fetch(url + path, {
      method, redirect: 'manual',
      headers: { ...(body === undefined ? {} : { 'content-type': 'application/json' }), ...(as === undefined ? {} : as.startsWith('wm_') ? { authorization: `Bearer ${as}` } : { cookie: as }), ...headers },
      ...(sent === undefined ? {} : { body: sent as string }),
    })
    const text = await answer.text()
    const json = /json/.test(answer.headers.get('content-type') ?? '') ? JSON.parse(text) as Reply['json'] : {} as Reply['json']
    assertDeclared(method, path, answer.status, answer.headers, json)
    return { status: answer.status, headers: answer.headers, text, json }
  }
  async function signIn(who: Role | { email: string, password: string, panel?: boolean }): Promise<string> {
    const body = typeof who === 'string' ? { email: people[who].email, password: admin.password } : who
    const { status, headers, text } = await call('POST', '/api/sign-in', { body })
    if (status !== 200) throw new Error(`${body.email} could not sign in: ${text}`)
    return (headers.getSetCookie().at(-1) ?? '').replace(/;.*$/s, '')
  }
  async function stop(signal: NodeJS.Signals = 'SIGTERM'): Promise<void> {
    if (child.exitCode === null && child.signalCode === null) {
      const ended = new Promise(resolve => child.once('exit', resolve))
      child.kill(signal)
      await ended
    }
    if (ours) rmSync(folder, { recursive: true, force: true })
  }
  return { url, folder, output, call, signIn, stop }
}

/** Fails the test where an answer is not one that the table declares: a wrong status, shape, or problem. */
function assertDeclared(method: string, path: string, status: number, headers: Headers, json: unknown): void {
  const name = matchRoute(method, path.replace(/\?.*$/s, ''))
  if (status >= 400 && headers.get('content-type') === 'application/problem+json') {
    problemSchema.parse(json)
    return
  }
  if (name === null) return
  const { answers }: RouteDeclaration = routes[name]
  const declared = answers[status]
  if (declared === undefined) throw new Error(`${name} answered ${status}, which the table does not declare.`)
  if (declared !== 'file' && status !== 204 && headers.get('content-type') === 'application/json') (declared as z.ZodType).parse(json)
}

async function registerPeople({ call, signIn }: TestServer): Promise<void> {
  const as = await signIn(admin)
  for (const role of ['technician', 'planner', 'auditor'] as const) {
    const { status, text } = await call('POST', '/api/people', { as, body: { ...people[role], roles: [role], siteIds: [], password: admin.password } })
    if (status !== 201) throw new Error(`${role} was not registered: ${text}`)
  }
}
