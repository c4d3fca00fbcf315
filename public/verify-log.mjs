#!/usr/bin/env node
// Verifies an exported log of Witnessmark with nothing but Node: no server, no packages, no network.
//
//   node verify-log.mjs LOG [--checkpoint FILE]... [--key NAME+ID+KEY]
//
// LOG is the export: one entry a line. Each checkpoint that you kept elsewhere is held against it. Without --key the keys that
// the log itself names are used; give the key that you wrote down if you trust nobody. Ends with 0 where all holds, 1 where
// something does not, 2 where the call makes no sense.
//
// What it does, so that you can check the checker: RFC 9162 section 2.1.1 (leaf = SHA-256(0 | line), node = SHA-256(1 | left |
// right), split at the largest power of two), C2SP tlog-checkpoint and signed-note (Ed25519, RFC 8032).
import { createHash, createPublicKey, verify } from 'node:crypto'
import { createReadStream, readFileSync } from 'node:fs'
import { createInterface } from 'node:readline'

const sha256 = (...parts) => parts.reduce((hash, part) => hash.update(part), createHash('sha256')).digest()
const zero = Buffer.from([0])
const one = Buffer.from([1])
const faults = []
const fault = (place, what) => faults.push(`${place}: ${what}`)

/** Keys in order, no space, numbers and texts as JSON.stringify has them: RFC 8785 for what a log holds. */
function canonical(value) {
  if (Array.isArray(value)) return `[${value.map(canonical).join(',')}]`
  if (typeof value !== 'object' || value === null) return JSON.stringify(value)
  const keys = Object.keys(value).sort((a, b) => (a < b ? -1 : 1))
  return `{${keys.map(key => `${JSON.stringify(key)}:${canonical(value[key])}`).join(',')}}`
}

function readCheckpoint(file) {
  const [body, signed = ''] = readFileSync(file, 'utf8').replaceAll('\r\n', '\n').trim().split('\n\n')
  const [origin, size, root, ...more] = body.split('\n')
  if (!/^\d+$/.test(size ?? '') || Buffer.from(root ?? '', 'base64').length !== 32 || more.length > 0) return fault(file, 'is no checkpoint (origin, size, root, an empty line, signatures)')
  return { file, origin, size: Number(size), root: Buffer.from(root, 'base64'), signed: Buffer.from(`${body}\n`, 'utf8'), signatures: signed.split('\n') }
}

function readKey(line) {
  const [, name, id, encoded] = /^([^\s+]+)\+([0-9a-f]{8})\+([A-Za-z0-9+/=]+)$/.exec(line) ?? []
  const bytes = Buffer.from(encoded ?? '', 'base64')
  if (bytes.length !== 33 || bytes[0] !== 1) throw new Error(`no key: ${line}`)
  if (sha256(Buffer.from(`${name}\n`), bytes).subarray(0, 4).toString('hex') !== id) throw new Error(`the key does not fit its id: ${line}`)
  const key = createPublicKey({ key: { kty: 'OKP', crv: 'Ed25519', x: bytes.subarray(1).toString('base64url') }, format: 'jwk' })
  return { name, id: Buffer.from(id, 'hex'), key }
}

function call(given) {
  const asked = { log: undefined, checkpoints: [], keys: [] }
  const words = [...given]
  for (let word = words.shift(); word !== undefined; word = words.shift()) {
    if (word === '--checkpoint' || word === '--key') {
      const value = words.shift()
      if (value === undefined) return null
      asked[word === '--key' ? 'keys' : 'checkpoints'].push(value)
    }
    else if (asked.log === undefined && !word.startsWith('-')) asked.log = word
    else return null
  }
  return asked.log === undefined ? null : asked
}

/** Reads the log line by line; holds one hash for each 1 in the binary form of its length. */
async function walk(file, sizes) {
  const edge = []
  const roots = new Map()
  const keys = []
  const root = () => edge.length === 0 ? sha256() : edge.map(({ hash }) => hash).reduceRight((right, left) => sha256(one, left, right))
  let [size, newest] = [0, '']
  for await (const line of createInterface({ input: createReadStream(file, 'utf8'), crlfDelay: Infinity })) {
    if (sizes.has(size)) roots.set(size, root())
    try {
      const entry = JSON.parse(line)
      if (entry.seq !== size) fault(`entry ${size}`, `says that it is entry ${entry.seq}`)
      if (entry.at < newest) fault(`entry ${size}`, `is of ${entry.at}, and one before it is of ${newest}`)
      if (canonical(entry) !== line) fault(`entry ${size}`, 'is not in its canonical form')
      if (entry.subject.kind === 'setting' && entry.subject.id === 'trail-key') keys.push(readKey(entry.state.value))
      newest = entry.at
    }
    catch (error) {
      fault(`entry ${size}`, `cannot be read: ${error.message}`)
    }
    let node = { level: 0, hash: sha256(zero, line) }
    while (edge.at(-1)?.level === node.level) node = { level: node.level + 1, hash: sha256(one, edge.pop().hash, node.hash) }
    edge.push(node)
    size += 1
  }
  roots.set(size, root())
  return { size, roots, keys, root: root() }
}

function hold(checkpoint, { size, roots }, keys) {
  const { file, origin, signed, signatures } = checkpoint
  if (checkpoint.size > size) return fault(file, `is over ${checkpoint.size} entries; the log has ${size}: its end is cut off`)
  if (!roots.get(checkpoint.size)?.equals(checkpoint.root)) fault(file, `has another root over ${checkpoint.size} entries: entries up to there were rewritten`)
  const own = keys.filter(({ name }) => name === origin)
  const signature = signatures.map(line => /^\u2014 (\S+) ([A-Za-z0-9+/=]+)$/.exec(line)).find(found => found?.[1] === origin)
  const bytes = Buffer.from(signature?.[2] ?? '', 'base64')
  const key = own.find(({ id }) => bytes.subarray(0, 4).equals(id))
  if (!key || !verify(null, signed, key.key, bytes.subarray(4))) fault(file, `bears no sound signature of ${origin}`)
}

const asked = call(process.argv.slice(2))
if (asked === null) {
  console.error('node verify-log.mjs LOG [--checkpoint FILE]... [--key NAME+ID+KEY]')
  process.exit(2)
}
const checkpoints = asked.checkpoints.map(readCheckpoint).filter(Boolean)
const walked = await walk(asked.log, new Set(checkpoints.map(({ size }) => size)))
const keys = asked.keys.length > 0 ? asked.keys.map(readKey) : walked.keys
for (const checkpoint of checkpoints) hold(checkpoint, walked, keys)
console.log(`${walked.size} entries, root ${walked.root.toString('base64')}`)
for (const { name, id } of keys) console.log(`key ${name}+${id.toString('hex')}${asked.keys.length > 0 ? ', as given' : ', as the log names it'}`)
if (checkpoints.length === 0) console.log('No checkpoint was given: only one that was kept elsewhere proves that nothing was rewritten.')
for (const each of faults.slice(0, 100)) console.error(each)
console.log(faults.length === 0 ? 'All holds.' : `${faults.length} ${faults.length === 1 ? 'fault' : 'faults'}.`)
process.exitCode = faults.length === 0 ? 0 : 1
