import { describe, expect, it } from 'vitest'
import { runQueue } from '../../../../utils/upload/queue'

const pause = () => new Promise<void>(done => setTimeout(done, 1))

describe('runQueue', () => {
  it('does every item once, never more than the width at a time, begun in order', async () => {
    const begun: number[] = []
    let now = 0
    let most = 0
    await runQueue(Array.from({ length: 30 }, (_, n) => n), 4, async (n) => {
      begun.push(n)
      most = Math.max(most, now += 1)
      await pause()
      now -= 1
    })
    expect(begun).toEqual(Array.from({ length: 30 }, (_, n) => n))
    expect(most).toBe(4)
  })

  it('begins nothing more once stopped, and waits for what is on its way', async () => {
    const done: number[] = []
    let stopped = false
    await runQueue([1, 2, 3, 4, 5], 2, async (n) => {
      await pause()
      done.push(n)
      stopped = true
    }, () => stopped)
    expect(done.sort()).toEqual([1, 2])
  })

  it('ends at once with nothing to do', async () => {
    await expect(runQueue([], 4, async () => {})).resolves.toBeUndefined()
  })
})
