import { randomBytes, scrypt, timingSafeEqual } from 'node:crypto'
import { Refusal } from '#shared/errors/refusal'

const shortest = 15
const blockSize = 8
/** Each hash takes 128 MiB at the standard cost: more than two at once would let sign-ins eat the machine. */
const atOnce = 2

/** NFKC, so that one keyboard's umlaut equals another's; the whole password counts, however long (NIST SP 800-63B, 3.1.1.2). */
const normal = (password: string) => password.normalize('NFKC')

/*
 * Texts that people take first when 15 characters are asked for. Common practice (NIST SP 800-63B, 3.1.1.2 asks for such a
 * list); these are ours, compared without case and without anything but letters and figures.
 */
const common = new Set([
  'passwordpassword', 'passwordpassword1', 'password123456789', 'password1234567890', 'passwort123456789', 'passwortpasswort', '123456789012345',
  '1234567890123456', '123451234512345', '1234567812345678', '12345678901234567890', '0123456789012345', '987654321987654321', 'qwertyuiopasdfg',
  'qwertyuiopasdfghjkl', 'qwertyuiop123456', 'qwertyuiop1234567890', 'qwertzuiopasdfg', 'qwertyqwertyqwerty', 'abcdefghijklmno', 'abcdefghijklmnop',
  'abcdefghijklmnopqrstuvwxyz', 'abc123abc123abc123', 'adminadminadmin', 'administrator123', 'administratorpassword', 'letmeinletmein1', 'letmeinletmeinletmein',
  'iloveyouiloveyou', 'welcomewelcome1', 'welcome123456789', 'changemechangeme', 'changemechangeme1', 'correcthorsebatterystaple', 'witnessmarkwitnessmark',
  'maintenance12345', 'maintenancemaintenance', 'thisismypassword', 'mypasswordisthis', 'mypasswordmypassword', 'secretsecretsecret', 'asdfghjklasdfghjkl',
])

/** Refuses what is too short, common, or one pattern over and over; `own` are name and e-mail, which must not be all of it. */
export function assertStrong(password: string, own: readonly string[]): void {
  const message = weaknessOf(normal(password), own)
  if (message !== null) throw new Refusal('password-weak', message, { errors: [{ at: '/password', code: 'password-weak', message }] })
}

const plain = (text: string) => text.toLowerCase().replaceAll(/[^\p{L}\p{N}]/gu, '')

function weaknessOf(text: string, own: readonly string[]): string | null {
  if ([...text].length < shortest) return `A password has at least ${shortest} characters; several words do well.`
  if (common.has(plain(text))) return 'This password is one of those tried first. Take several words that do not belong together.'
  if (repeats(text)) return 'This password is one pattern repeated. Take several words that do not belong together.'
  if (own.some(word => word !== '' && plain(text) === plain(word))) return 'A name or an e-mail address is no password.'
  return null
}

/** One piece of up to five characters, over and over. */
const repeats = (text: string) => /^(.{1,5})\1*(?:.{0,4})$/su.test(text) && new Set(text).size <= 5

let running = 0
const waiting: (() => void)[] = []

async function derived(password: string, salt: Buffer, cost: number): Promise<Buffer> {
  while (running >= atOnce) await new Promise<void>((resolve) => { waiting.push(resolve) })
  running += 1
  try {
    return await new Promise((resolve, reject) => {
      scrypt(normal(password), salt, 32, { N: cost, r: blockSize, p: 1, maxmem: 256 * cost * blockSize }, (error, key) => (error ? reject(error) : resolve(key)))
    })
  }
  finally {
    running -= 1
    waiting.shift()?.()
  }
}

/** `scrypt$N$salt$key`, salt and key in base64; the cost stands in it, so that a later, higher one verifies old hashes too. */
export async function hashPassword(password: string, cost: number): Promise<string> {
  const salt = randomBytes(16)
  const key = await derived(password, salt, cost)
  return ['scrypt', cost, salt.toString('base64'), key.toString('base64')].join('$')
}

/** False for a wrong password and for a hash that is none of ours. */
export async function verifyPassword(hash: string, password: string): Promise<boolean> {
  const [scheme, cost, salt, key] = hash.split('$')
  if (scheme !== 'scrypt' || !cost || !salt || !key) return false
  const expected = Buffer.from(key, 'base64')
  return timingSafeEqual(await derived(password, Buffer.from(salt, 'base64'), Number(cost)), expected)
}
