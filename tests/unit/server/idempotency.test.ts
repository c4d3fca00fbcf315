import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Vault } from '../../../server/database/client'
import { answer, file, type Answer, type FileAnswer } from '../../../server/http/answer'
import { fingerprintOf, runOnce } from '../../../server/http/idempotency'
import { codeOf } from '../../support/codes'
import { personActor } from '../../support/plant'
import { freshVault } from '../../support/vault'

const secret = 'the secret of this test, long enough'
let vault: Vault
let remove: () => void
let now: number
beforeEach(() => {
  now = Date.now();
  ({ vault, remove } = freshVault({ clock: () => now }))
})
afterEach(() => { remove() })

function caller(name = 'Runa Haldersen') {
  const actor = personActor(vault, name, ['planner'])
  let runs = 0
  const send = (key: string | null, body: string, work: () => Answer | FileAnswer = () => answer(201, { id: runs })) =>
    runOnce(vault, secret, actor, key === null ? null : { key, route: 'POST /api/sites', fingerprint: fingerprintOf(secret, 'POST', '/api/sites', body) }, () => {
      runs += 1
      return work()
    })
  return { send, runs: () => runs }
}

describe('a keyed request', () => {
  it('is carried out once and answered alike', () => {
    const { send, runs } = caller()
    expect(send('k1', '{"a":1}')).toEqual({ answer: answer(201, { id: 1 }), replayed: false })
    expect(send('k1', '{"a":1}')).toEqual({ answer: answer(201, { id: 1 }), replayed: true })
    expect(send('k2', '{"a":1}').replayed).toBe(false)
    expect(runs()).toBe(2)
  })

  it('with another body under its key is refused', () => {
    const { send, runs } = caller()
    send('k1', '{"a":1}')
    expect(codeOf(() => send('k1', '{"a":2}'))).toBe('key-reused')
    expect(runs()).toBe(1)
  })

  it('of another person is another request', () => {
    const first = caller()
    const second = caller('Tobias Achterberg')
    first.send('k1', '{}')
    expect(second.send('k1', '{"other":true}').replayed).toBe(false)
  })

  it('is forgotten after a day, not before', () => {
    const { send } = caller()
    send('k1', '{}')
    now += 24 * 3_600_000 - 1
    expect(send('k1', '{}').replayed).toBe(true)
    now += 2
    expect(send('k1', '{}').replayed).toBe(false)
  })

  it('that failed left nothing and is tried anew', () => {
    const { send } = caller()
    expect(() => send('k1', '{}', () => { throw new Error('midway') })).toThrow('midway')
    expect(send('k1', '{}').replayed).toBe(false)
  })

  it('keeps files and answers without a body', () => {
    const { send } = caller()
    send('k1', '{}', () => file('move;target\n', 'text/csv', { name: 'kit.csv' }))
    expect(send('k1', '{}')).toEqual({ answer: file('move;target\n', 'text/csv', { name: 'kit.csv' }), replayed: true })
    send('k2', '{}', () => answer(204, null))
    expect(send('k2', '{}').answer).toEqual(answer(204, null))
  })

  it('without a key is carried out each time', () => {
    const { send, runs } = caller()
    send(null, '{}')
    send(null, '{}')
    expect(runs()).toBe(2)
  })

  it('leaves neither key, body nor answer readable in the database', () => {
    const { send } = caller()
    send('the-key', '{"password":"copper kettle"}', () => answer(201, { token: 'wm_secret' }))
    const stored = JSON.stringify(vault.sqlite.prepare('SELECT * FROM idempotency').all())
    for (const word of ['the-key', 'copper', 'wm_secret']) expect(stored).not.toContain(word)
  })
})
