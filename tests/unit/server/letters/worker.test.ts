import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { letter } from '../../../../server/database/schema'
import { PostError, type Post } from '../../../../server/mail/post'
import type { Message } from '../../../../server/mail/message'
import { watchPlace } from '../../../../server/services/letters/own'
import { tellWatchers } from '../../../../server/services/letters/queue'
import { postActor } from '../../../../server/services/letters/send'
import { startLetters } from '../../../../server/services/letters/worker'
import { iso, openPlant, start, type Plant } from '../../../support/vault-plant'

let plant: Plant
let axisId: number
const sent: Message[] = []
const errors: unknown[] = []
const logger = { info: () => undefined, error: (told: unknown) => { errors.push(told) } } as never

beforeEach(() => {
  vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout'] })
  sent.length = 0
  errors.length = 0
  plant = openPlant()
  axisId = plant.axis('LID-02.Z')
  watchPlace(plant.vault, plant.person('Ines Okafor', ['auditor']), { scope: 'axis', scopeId: axisId, watched: true })
})
afterEach(() => {
  vi.useRealTimers()
  if (plant.vault.sqlite.open) plant.close()
})

const post = (send: Post['send'] = async (message) => { sent.push(message) }): Post & { closed: () => boolean } => {
  let closed = false
  return { way: 'smtp', from: 'Witnessmark <marks@larkfield.example>', send, close: () => { closed = true }, closed: () => closed }
}
const write = (swapId: number) => plant.vault.write(postActor, write => tellWatchers(plant.vault.db, write, 'swap-released', axisId, { swapId, at: iso(start), by: 'Runa', unitOut: 'A', unitIn: 'B', knownGood: null }))
const states = () => plant.vault.db.select({ state: letter.state }).from(letter).orderBy(letter.id).all().map(({ state }) => state)
const begin = (by: Post) => startLetters({ vault: plant.vault, post: by, publicOrigin: null, logger })

describe('the worker', () => {
  it('sends what waits at the start and what comes later, and leaves no timer behind', async () => {
    write(1)
    const by = post()
    const worker = begin(by)
    await vi.advanceTimersByTimeAsync(0)
    expect(sent).toHaveLength(1)
    write(2)
    await vi.advanceTimersByTimeAsync(5000)
    expect(sent).toHaveLength(2)
    await worker.stop()
    expect([vi.getTimerCount(), by.closed()]).toEqual([0, true])
  })

  it('goes on after a fault, and tells it', async () => {
    let faults = 1
    write(1)
    const worker = begin(post(async (message) => {
      if (faults-- > 0) throw new TypeError('a fault of ours')
      sent.push(message)
    }))
    await vi.advanceTimersByTimeAsync(0)
    expect(errors).toMatchObject([{ err: { message: 'a fault of ours' } }])
    plant.now += 15 * 60_000
    await vi.advanceTimersByTimeAsync(5000)
    expect([sent.length, states()]).toEqual([1, ['sent']])
    await worker.stop()
  })

  it('stops after the letter under way, and sends no other', async () => {
    let arrive: () => void = () => undefined
    write(1)
    write(2)
    const arrival = new Promise<void>((resolve) => { arrive = resolve })
    const worker = begin(post(message => arrival.then(() => { sent.push(message) })))
    await vi.advanceTimersByTimeAsync(0)
    const stopping = worker.stop()
    arrive()
    await stopping
    expect([sent.length, states(), vi.getTimerCount()]).toEqual([1, ['sent', 'queued'], 0])
  })

  it('waits no longer than five seconds for it, and harms nothing when its end comes after the vault was closed', async () => {
    let fail: () => void = () => undefined
    write(1)
    const worker = begin(post(() => new Promise((_, reject) => { fail = () => reject(new PostError('unreachable', 'cut off')) })))
    await vi.advanceTimersByTimeAsync(0)
    const stopping = worker.stop()
    await vi.advanceTimersByTimeAsync(5000)
    await stopping
    expect(states()).toEqual(['queued'])
    plant.close()
    fail()
    await vi.advanceTimersByTimeAsync(0)
    expect([errors, vi.getTimerCount()]).toEqual([[], 0])
  })
})
