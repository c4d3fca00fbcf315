import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { PersonActor } from '../../../server/database/actor'
import type { Vault } from '../../../server/database/client'
import { hashPassword, assertStrong, verifyPassword } from '../../../server/services/people/password'
import { isUnclaimed, registerFirstAdmin, setUp, setUpToken } from '../../../server/services/people/first-start'
import { newOwnPassword, setOwnPassword } from '../../../server/services/people/own-password'
import { changePerson, findPerson, hashFor, listNames, listPeople, me, registerPerson } from '../../../server/services/people/people'
import { beginSession, endSession, findSession, sessionLife } from '../../../server/services/people/sessions'
import { signIn, verifyOwnPassword } from '../../../server/services/people/sign-in'
import { findToken, listTokens, makeToken, stopToken, tokenSites } from '../../../server/services/people/tokens'
import { listLog } from '../../../server/services/log/log'
import { codeOf, codeOfAsync } from '../../support/codes'
import { freshVault } from '../../support/vault'

const password = 'copper kettle under the stairs'
const peer = '192.0.2.7'
let vault: Vault
let remove: () => void
let now: number
let admin: PersonActor
beforeEach(async () => {
  now = Date.now();
  ({ vault, remove } = freshVault({ clock: () => now }))
  const id = await registerFirstAdmin(vault, { name: 'Ines Okafor', email: 'ines@larkfield.example', password })
  admin = { kind: 'person', id, name: 'Ines Okafor', roles: ['admin'], sites: null, shared: false, session: null, peer }
})
afterEach(() => { remove() })

async function person(name: string, roles: ('technician' | 'planner' | 'auditor' | 'admin')[] = ['technician'], siteIds: number[] = []) {
  const body = { name, email: `${name.toLowerCase().replaceAll(' ', '.')}@larkfield.example`, roles, siteIds, password }
  return registerPerson(vault, admin, body, await hashFor(vault, password, [])).id
}

describe('the first start', () => {
  it('has one administrator, once', async () => {
    expect(isUnclaimed(vault)).toBe(false)
    expect(await codeOfAsync(() => registerFirstAdmin(vault, { name: 'Other', email: 'o@larkfield.example', password }))).toBe('set-up-done')
    expect(await codeOfAsync(() => setUp(vault, setUpToken(vault), { name: 'Other', email: 'o@larkfield.example', password }))).toBe('set-up-done')
  })

  it('takes the printed token only', async () => {
    const fresh = freshVault()
    const token = setUpToken(fresh.vault)
    expect(token).toMatch(/^[\w-]{32}$/)
    expect(setUpToken(fresh.vault)).toBe(token)
    const claim = (given: string, secret = password) => setUp(fresh.vault, given, { name: 'Ines', email: 'i@larkfield.example', password: secret, plant: 'Larkfield' })
    expect(await codeOfAsync(() => claim(`${token.slice(0, -1)}!`))).toBe('set-up-token')
    expect(await codeOfAsync(() => claim(token, 'short'))).toBe('password-weak')
    const id = await claim(token)
    expect(me(fresh.vault, { ...admin, id })).toMatchObject({ plant: 'Larkfield', empty: true, roles: ['admin'] })
    fresh.remove()
  })
})

describe('passwords', () => {
  it.each(['fourteen chars', 'PasswordPassword', 'password 123456789', 'aaaaaaaaaaaaaaaa', 'abcabcabcabcabcabc', '12121212121212121', 'ines@larkfield.example', '123456789012345'])('refuses %s', text =>
    expect(codeOf(() => assertStrong(text, ['Ines Okafor', 'ines@larkfield.example']))).toBe('password-weak'))
  it.each([password, 'fifteen letters', 'Fünfzehn Zeichen', '🔩🔧🪛🔨⚙🔩🔧🪛🔨⚙🔩🔧🪛🔨⚙x'])('takes %s', text => expect(() => assertStrong(text, ['Ines Okafor'])).not.toThrow())

  it('counts characters, not code units: eight screws are no fifteen', () => {
    expect(codeOf(() => assertStrong('🔩🔧🪛🔨🔩🔧🪛🔨', []))).toBe('password-weak')
  })

  it('are equal in both forms of an umlaut, and differ in their last character however long', async () => {
    const hash = await hashPassword('Fu\u0308nfzehn Zeichen', 1024)
    expect(await verifyPassword(hash, 'F\u00fcnfzehn Zeichen')).toBe(true)
    const long = 'x'.repeat(255)
    expect(await verifyPassword(await hashPassword(`${long}a`, 1024), `${long}b`)).toBe(false)
  })

  it('are salted, and verified by the cost that stands in the hash', async () => {
    const [one, two] = await Promise.all([hashPassword(password, 1024), hashPassword(password, 2048)])
    expect(one).not.toBe(await hashPassword(password, 1024))
    expect(two.startsWith('scrypt$2048$')).toBe(true)
    expect(await verifyPassword(two, password)).toBe(true)
    expect(await verifyPassword('plain', 'plain')).toBe(false)
  })

  it('hash right when more come than may run at once', async () => {
    const hashes = await Promise.all(Array.from({ length: 9 }, (_, index) => hashPassword(`${password} ${index}`, 1024)))
    expect(await Promise.all(hashes.map((hash, index) => verifyPassword(hash, `${password} ${index}`)))).toEqual(Array.from({ length: 9 }, () => true))
  })
})

describe('signing in', () => {
  it('needs e-mail and password, and says the same whatever was wrong', async () => {
    expect((await signIn(vault, 'INES@larkfield.example', password, peer)).id).toBe(admin.id)
    const messages = await Promise.all([['ines@larkfield.example', 'wrong'], ['nobody@larkfield.example', password]].map(async ([email = '', text = '']) =>
      signIn(vault, email, text, peer).then(() => 'in', (error: Error) => error.message)))
    expect(new Set(messages).size).toBe(1)
  })

  it('stops after ten failures of an account, however many at once, and not for another account', async () => {
    const attempts = await Promise.all(Array.from({ length: 25 }, () => codeOfAsync(() => signIn(vault, 'ines@larkfield.example', 'wrong', peer))))
    expect(attempts.filter(code => code === 'sign-in-failed')).toHaveLength(10)
    expect(attempts.filter(code => code === 'throttled')).toHaveLength(15)
    expect(await codeOfAsync(() => signIn(vault, 'ines@larkfield.example', password, '192.0.2.8'))).toBe('throttled')
    await person('Tobias Achterberg')
    expect((await signIn(vault, 'tobias.achterberg@larkfield.example', password, peer)).name).toBe('Tobias Achterberg')
  })

  it('stops an address after sixty failures over many accounts', async () => {
    const codes: string[] = []
    for (let index = 0; index < 62; index += 1) codes.push(await codeOfAsync(() => signIn(vault, `nobody${index}@larkfield.example`, 'x', peer)))
    expect(codes.indexOf('throttled')).toBe(60)
    expect((await signIn(vault, 'ines@larkfield.example', password, '192.0.2.8')).id).toBe(admin.id)
  })

  it('counts failures only', async () => {
    for (let index = 0; index < 15; index += 1) await signIn(vault, 'ines@larkfield.example', password, peer)
    expect(await verifyOwnPassword(vault, admin, password)).toBe('right')
    expect(await verifyOwnPassword(vault, admin, 'wrong')).toBe('wrong')
  })

  it('counts failed signatures with them', async () => {
    for (let index = 0; index < 10; index += 1) expect(await verifyOwnPassword(vault, admin, 'wrong')).toBe('wrong')
    expect(await codeOfAsync(() => verifyOwnPassword(vault, admin, password))).toBe('throttled')
    expect(await codeOfAsync(() => signIn(vault, 'ines@larkfield.example', password, peer))).toBe('throttled')
  })
})

describe('sessions', () => {
  const minute = 60_000
  it('live while used, and end after twelve idle hours', () => {
    const sid = beginSession(vault, admin.id, false, peer)
    for (let step = 0; step < 5; step += 1) {
      now += sessionLife.idle - minute
      expect(findSession(vault, sid, peer)?.id).toBe(admin.id)
    }
    now += sessionLife.idle
    expect(findSession(vault, sid, peer)).toBeNull()
  })

  it('end after five idle minutes on a panel', () => {
    const sid = beginSession(vault, admin.id, true, peer)
    now += 4.9 * minute
    expect(findSession(vault, sid, peer)).not.toBeNull()
    now += 5 * minute
    expect(findSession(vault, sid, peer)).toBeNull()
  })

  it('end after seven days, however busy', () => {
    const sid = beginSession(vault, admin.id, false, peer)
    for (let hours = 0; hours < 7 * 24 - 6; hours += 6) {
      now += 6 * 60 * minute
      expect(findSession(vault, sid, peer), `after ${hours + 6} h`).not.toBeNull()
    }
    now += 6 * 60 * minute
    expect(findSession(vault, sid, peer)).toBeNull()
  })

  it('end at once at sign-out, a new password, an end; a changed role holds at once', async () => {
    const id = await person('Tobias Achterberg')
    const [first, second] = [beginSession(vault, id, false, peer), beginSession(vault, id, false, peer)]
    changePerson(vault, admin, id, { rev: 1, roles: ['planner'], siteIds: [4] }, null)
    expect(findSession(vault, first, peer)).toMatchObject({ roles: ['planner'], sites: [4] })
    endSession(vault, findSession(vault, first, peer)?.session ?? '')
    expect(findSession(vault, first, peer)).toBeNull()
    expect(findSession(vault, second, peer)).not.toBeNull()
    changePerson(vault, admin, id, { rev: 2, password }, await hashFor(vault, password, []))
    expect(findSession(vault, second, peer)).toBeNull()
    const third = beginSession(vault, id, false, peer)
    changePerson(vault, admin, id, { rev: 3, ended: true }, null)
    expect(findSession(vault, third, peer)).toBeNull()
    expect(await codeOfAsync(() => signIn(vault, 'tobias.achterberg@larkfield.example', password, peer))).toBe('sign-in-failed')
    expect(listNames(vault).map(({ name }) => name)).toEqual(['Ines Okafor'])
    expect(listPeople(vault, {}).items.map(({ name }) => name)).toEqual(['Ines Okafor', 'Tobias Achterberg'])
  })

  it('of others end with a new password of one’s own, this one does not', async () => {
    const [mine, other] = [beginSession(vault, admin.id, false, peer), beginSession(vault, admin.id, false, peer)]
    const actor = findSession(vault, mine, peer)
    if (actor === null) throw new Error('no session')
    expect(await codeOfAsync(() => newOwnPassword(vault, actor, { current: 'wrong', password }))).toBe('password-wrong')
    expect(await codeOfAsync(() => newOwnPassword(vault, actor, { current: password, password: 'short' }))).toBe('password-weak')
    setOwnPassword(vault, actor, await newOwnPassword(vault, actor, { current: password, password: 'orchard ladder in the rain' }))
    expect(findSession(vault, mine, peer)).not.toBeNull()
    expect(findSession(vault, other, peer)).toBeNull()
    expect((await signIn(vault, 'ines@larkfield.example', 'orchard ladder in the rain', peer)).id).toBe(admin.id)
  })

  it('stand in the database as a hash only', () => {
    const sid = beginSession(vault, admin.id, false, peer)
    expect(JSON.stringify(vault.sqlite.prepare('SELECT * FROM session').all())).not.toContain(sid)
  })
})

describe('people', () => {
  it('keep at least one administrator who can sign in', async () => {
    expect(codeOf(() => changePerson(vault, admin, admin.id, { rev: 1, roles: ['planner'] }, null))).toBe('last-admin')
    expect(codeOf(() => changePerson(vault, admin, admin.id, { rev: 1, ended: true }, null))).toBe('last-admin')
    await person('Second Admin', ['admin'])
    expect(changePerson(vault, admin, admin.id, { rev: 1, roles: ['planner'] }, null).roles).toEqual(['planner'])
  })

  it('have an e-mail address of their own', async () => {
    await person('Tobias Achterberg')
    expect(await codeOfAsync(() => person('tobias ACHTERBERG'))).toBe('taken')
  })

  it('are edited by rev, and no hash leaves the vault', async () => {
    const id = await person('Tobias Achterberg')
    expect(codeOf(() => changePerson(vault, admin, id, { name: 'T' }, null))).toBe('rev-missing')
    expect(codeOf(() => changePerson(vault, admin, id, { rev: 7, name: 'T' }, null))).toBe('edited-meanwhile')
    expect(changePerson(vault, admin, id, { rev: 1, name: 'Tobias A.' }, null)).toMatchObject({ rev: 2, hasPassword: true })
    const everything = JSON.stringify([listPeople(vault, {}), listLog(vault, admin, { limit: 200 })])
    expect(everything).not.toContain('scrypt')
    expect(everything).not.toContain(findPerson(vault, id).passwordHash)
  })
})

describe('tokens', () => {
  const body = { name: 'nightly', scopes: ['upload' as const], siteIds: [], endsAt: '' }
  const inDays = (days: number) => new Date(now + days * 86_400_000).toISOString()

  it('are shown once, kept as a hash, and end at their date', () => {
    const { token } = makeToken(vault, admin, { ...body, endsAt: inDays(30) })
    expect(token).toMatch(/^wm_[\w-]{43}$/)
    expect(findToken(vault, token, peer)).toMatchObject({ kind: 'token', ownerId: admin.id, scopes: ['upload'], sites: null })
    expect(JSON.stringify([vault.sqlite.prepare('SELECT * FROM token').all(), listTokens(vault, {}), listLog(vault, admin, { limit: 200 })])).not.toContain(token)
    now += 30 * 86_400_000
    expect(findToken(vault, token, peer)).toBeNull()
  })

  it('end when told, and with their owner', async () => {
    const first = makeToken(vault, admin, { ...body, endsAt: inDays(30) })
    stopToken(vault, admin, first.id)
    expect(findToken(vault, first.token, peer)).toBeNull()
    expect(codeOf(() => stopToken(vault, admin, first.id))).toBe('already-ended')
    const ownerId = await person('Tobias Achterberg')
    const second = makeToken(vault, admin, { ...body, endsAt: inDays(30), ownerId })
    changePerson(vault, admin, ownerId, { rev: 1, ended: true }, null)
    expect(findToken(vault, second.token, peer)).toBeNull()
    changePerson(vault, admin, ownerId, { rev: 2, ended: false }, null)
    expect(findToken(vault, second.token, peer)).toBeNull()
    expect(listTokens(vault, {}).items.every(({ endedAt }) => endedAt !== null)).toBe(true)
  })

  it('live at most a year, and are not made in the past or for who left', async () => {
    expect(codeOf(() => makeToken(vault, admin, { ...body, endsAt: inDays(367) }))).toBe('time-order')
    expect(codeOf(() => makeToken(vault, admin, { ...body, endsAt: inDays(-1) }))).toBe('time-order')
    const ownerId = await person('Tobias Achterberg')
    changePerson(vault, admin, ownerId, { rev: 1, ended: true }, null)
    expect(codeOf(() => makeToken(vault, admin, { ...body, endsAt: inDays(1), ownerId }))).toBe('already-ended')
    expect(codeOf(() => makeToken(vault, admin, { ...body, endsAt: inDays(1), ownerId: 99 }))).toBe('not-found')
  })

  it.each([
    [[], [], null], [[1], [], [1]], [[], [2], [2]], [[1, 2], [2, 3], [2]], [[1], [2], []],
  ])('of sites %j with an owner of %j see %j', (own, owners, sees) => { expect(tokenSites(own, owners)).toEqual(sees) })
})
