import { describe, expect, it } from 'vitest'
import { choiceGroups, letterOutcome, queueSentence, waySentence } from '../../../../utils/letters/words'

const span = () => '2 h'
const queue = { waiting: 0, waitingSince: null, way: 'smtp', publicUrl: true } as const

describe('the queue in a sentence', () => {
  it('says how many wait and since when', () => {
    expect(queueSentence(queue, span)).toBe('No letter waits')
    expect(queueSentence({ ...queue, waiting: 1, waitingSince: '2026-12-01T06:00:00.000Z' }, span)).toBe('1 letter waits, for 2 h')
    expect(queueSentence({ ...queue, waiting: 1200, waitingSince: '2026-12-01T06:00:00.000Z' }, span)).toBe('1 200 letters wait, the oldest for 2 h')
  })

  it('says where letters go, and what to set', () => {
    expect(waySentence(queue)).toMatch(/leave by the mail server/)
    expect(waySentence({ ...queue, way: 'folder' })).toMatch(/^SMTP_URL is not set: letters go to nobody/)
  })
})

describe('the outcome of a letter', () => {
  const letter = { state: 'queued', attempts: 0, problem: null, nextTryAt: '2026-12-01T06:00:00.000Z' } as const
  const said = (parts: object) => letterOutcome({ ...letter, ...parts }, () => '1 Dec 07:00')
  it.each([
    [{}, 'waits'],
    [{ attempts: 1 }, 'waits'],
    [{ attempts: 1, problem: 'busy' }, 'tried 1 time, next 1 Dec 07:00'],
    [{ attempts: 4, problem: 'busy' }, 'tried 4 times, next 1 Dec 07:00'],
    [{ state: 'sent', attempts: 1 }, 'sent'],
    [{ state: 'sent', attempts: 2 }, 'sent at the 2nd try'],
    [{ state: 'sent', attempts: 11 }, 'sent at the 11th try'],
    [{ state: 'sent', attempts: 23 }, 'sent at the 23rd try'],
    [{ state: 'failed', attempts: 9, problem: 'busy', nextTryAt: null }, 'failed'],
    [{ state: 'dropped', problem: 'Ines has left.', nextTryAt: null }, 'not sent'],
  ])('%o: %s', (parts, words) => expect(said(parts)).toBe(words))
})

describe('the kinds', () => {
  it('stand by how far they reach, and no group is empty', () => {
    const choice = (reach: 'watchers' | 'vault', kind: 'swap-released' | 'checkpoint') => ({ kind, reach, says: '', wanted: true })
    expect(choiceGroups({ choices: [choice('vault', 'checkpoint'), choice('watchers', 'swap-released')], watches: [] }).map(({ title, choices }) => [title, choices.length]))
      .toEqual([['Of what you watch', 1], ['Of the whole vault', 1]])
  })
})
