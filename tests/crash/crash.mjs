/*
 * npm run crash: kills the built server with kill -9 in the midst of concurrent uploads, a hundred times, on one vault. After
 * each restart every version that was ever acknowledged must be there with its content, what was sent without an answer is
 * sent again under its key and must be there once, and SQLite must find the file sound.
 */
import Database from 'better-sqlite3'
import { spawn } from 'node:child_process'
import { createHash } from 'node:crypto'
import { existsSync, mkdtempSync, rmSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { inflateSync } from 'node:zlib'

const rounds = Number(process.argv[2] ?? 100)
const uploaders = 6
const entry = fileURLToPath(new URL('../../.output/server/index.mjs', import.meta.url))
if (!existsSync(entry)) throw new Error('There is no built server: run npm run build first.')

const folder = mkdtempSync(join(tmpdir(), 'witnessmark-crash-'))
const admin = { email: 'ines.okafor@larkfield.example', password: 'copper kettle under the stairs' }
const planner = { name: 'Runa Haldersen', email: 'runa.haldersen@larkfield.example', password: admin.password }
const port = await freePort()
const url = `http://127.0.0.1:${port}`

function freePort() {
  return new Promise((resolve) => {
    const probe = createServer()
    probe.listen(0, '127.0.0.1', () => {
      const found = probe.address().port
      probe.close(() => resolve(found))
    })
  })
}

/** Starts the server and waits until it has said so and answers. */
async function start(word = 'vault open') {
  const child = spawn(process.execPath, [entry], {
    env: {
      PATH: process.env.PATH, PORT: String(port), NITRO_HOST: '127.0.0.1', WITNESSMARK_DATA: folder, WITNESSMARK_SCRYPT_COST: '1024',
      WITNESSMARK_ADMIN_EMAIL: admin.email, WITNESSMARK_ADMIN_PASSWORD: admin.password,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let printed = ''
  for (const stream of [child.stdout, child.stderr]) stream.on('data', (chunk) => { printed += chunk })
  for (let attempt = 0; attempt < 400; attempt += 1) {
    if (child.exitCode !== null) throw new Error(`The server did not start again: ${printed}`)
    if (printed.includes(word) && await fetch(`${url}/api/health`).then(answer => answer.ok, () => false)) return child
    await wait(25)
  }
  throw new Error(`The server did not answer: ${printed}`)
}

const wait = milliseconds => new Promise(resolve => setTimeout(resolve, milliseconds))

async function call(method, path, cookie, body, headers = {}) {
  const answer = await fetch(url + path, { method, headers: { 'content-type': 'application/json', ...(cookie ? { cookie } : {}), ...headers }, body: body && JSON.stringify(body) })
  return { status: answer.status, json: await answer.json(), cookie: answer.headers.getSetCookie().at(-1)?.replace(/;.*$/s, '') }
}

async function signIn({ email, password }) {
  const { status, cookie, json } = await call('POST', '/api/sign-in', undefined, { email, password })
  if (status !== 200) throw new Error(`Sign-in answered ${status}: ${JSON.stringify(json)}`)
  return cookie
}

async function made(path, cookie, body) {
  const { status, json } = await call('POST', path, cookie, body)
  if (status !== 201) throw new Error(`${path} answered ${status}: ${JSON.stringify(json)}`)
  return json.id
}

async function registerPlant() {
  await made('/api/people', await signIn(admin), { ...planner, roles: ['planner'], siteIds: [] })
  const cookie = await signIn(planner)
  const siteId = await made('/api/sites', cookie, { name: 'Larkfield Preserves', timeZone: 'Europe/Copenhagen' })
  const lineId = await made('/api/lines', cookie, { siteId, name: 'Jar line 1' })
  const machineId = await made('/api/machines', cookie, { lineId, name: 'Lid press 2' })
  for (let index = 0; index < uploaders; index += 1) {
    const axisId = await made('/api/axes', cookie, { machineId, tag: `LID-${index}.Z`, axisKind: 'linear' })
    const unitId = await made('/api/units', cookie, { serial: `SN-${index}`, model: 'HL40-200V' })
    await made('/api/fittings', cookie, { axisId, unitId, at: '2020-01-01T00:00:00Z' })
  }
}

let sent = 0
/** A file that no other upload equals. */
function nextFile(index) {
  sent += 1
  const moves = Array.from({ length: 24 }, (_, move) => ({ move, label: `Station ${move}`, kind: 'absolute', target: move * 7.5, speed: 100 + sent % 400, acceleration: 2000 }))
  return {
    schema: 'witnessmark.axis-settings/1', unit: { serial: `SN-${index}`, model: 'HL40-200V', firmware: '2.4' }, exportedAt: new Date().toISOString(), axisKind: 'linear',
    setup: { softLimitMin: 0, softLimitMax: 198, thrustLimit: 38 }, moves, extra: { Upload: sent },
  }
}

/** Version id → contentHash of every upload that was answered with 201. */
const acknowledged = new Map()
const unanswered = []
const failures = []
let resent = 0
let soundFiles = 0

async function upload(cookie, job) {
  const { status, json } = await call('POST', '/api/uploads', cookie, job.file, { 'idempotency-key': job.key })
  if (status !== 201) return failures.push(`an upload answered ${status}: ${JSON.stringify(json).slice(0, 300)}`)
  const known = acknowledged.get(json.version.id)
  if (known !== undefined && known !== json.version.contentHash) failures.push(`version ${json.version.id} was acknowledged with two contents`)
  acknowledged.set(json.version.id, json.version.contentHash)
}

async function uploadUntilKilled(cookie, index, killed) {
  while (!killed.done) {
    const job = { file: nextFile(index), key: `crash-${sent}` }
    try {
      await upload(cookie, job)
    }
    catch {
      // The server died before it answered: it may have stored the file or not, and either is right.
      unanswered.push(job)
      return
    }
  }
}

/** Looks beside the server, at the file itself. */
function inspect() {
  const sqlite = new Database(join(folder, 'vault.sqlite'), { readonly: true })
  try {
    const sound = sqlite.pragma('integrity_check', { simple: true })
    if (sound === 'ok') soundFiles += 1
    else failures.push(`integrity_check: ${sound}`)
    const find = sqlite.prepare('SELECT content.hash, content.text FROM version JOIN content ON content.id = version.content_id WHERE version.id = ?')
    for (const [id, contentHash] of acknowledged) {
      const row = find.get(id)
      if (!row) failures.push(`version ${id} was acknowledged and is gone`)
      else if (row.hash !== contentHash || createHash('sha256').update(inflateSync(row.text)).digest('hex') !== contentHash) failures.push(`version ${id} has another content`)
    }
    const twice = sqlite.prepare('SELECT count(*) FROM (SELECT 1 FROM version GROUP BY content_id HAVING count(*) > 1)').pluck().get()
    if (twice > 0) failures.push(`${twice} files were stored twice`)
    const torn = sqlite.prepare('SELECT count(*) FROM version WHERE NOT EXISTS (SELECT 1 FROM check_set WHERE version_id = version.id)').pluck().get()
    if (torn > 0) failures.push(`${torn} versions are without their judgement`)
    const { entries, newest } = sqlite.prepare('SELECT count(*) AS entries, max(seq) AS newest FROM log').get()
    if (entries !== newest + 1) failures.push(`the log has ${entries} entries and ends at ${newest}`)
  }
  finally {
    sqlite.close()
  }
}

const began = Date.now()
let child = await start('administrator registered')
try {
  await registerPlant()
  for (let round = 0; round < rounds && failures.length === 0; round += 1) {
    const cookie = await signIn(planner)
    for (const job of unanswered.splice(0)) {
      await upload(cookie, job)
      resent += 1
    }
    const killed = { done: false }
    const work = Array.from({ length: uploaders }, (_, index) => uploadUntilKilled(cookie, index, killed))
    await wait(20 + Math.random() * 280)
    const ended = new Promise(resolve => child.once('exit', resolve))
    child.kill('SIGKILL')
    killed.done = true
    await ended
    await Promise.all(work)
    child = await start()
    inspect()
  }
}
finally {
  child.kill('SIGKILL')
  rmSync(folder, { recursive: true, force: true })
}
for (const failure of failures.slice(0, 20)) console.error(failure)
console.log(`crash: ${rounds} rounds of kill -9, ${acknowledged.size} versions acknowledged, ${failures.length === 0 ? 'none lost' : `${failures.length} FAILURES`}, ${resent} sent again under their key and stored once, integrity_check ok ${soundFiles} times, ${Math.round((Date.now() - began) / 1000)} s`)
process.exitCode = failures.length === 0 && soundFiles === rounds && acknowledged.size > rounds ? 0 : 1
