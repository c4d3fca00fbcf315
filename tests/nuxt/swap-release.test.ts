import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import { SwapStepRelease } from '#components'
import { running } from '../support/swap-answers'

const hour = 3_600_000
const words = async (dueIn: number) => {
  const mounted = await mountSuspended(SwapStepRelease, { props: { swap: { ...running, releaseDueAt: new Date(Date.now() + dueIn).toISOString() } } })
  const text = mounted.text().replaceAll(/\s+/g, ' ')
  mounted.unmount()
  return text
}

describe('the term of a release', () => {
  it('is named while it runs', async () => {
    const text = await words(2 * hour)
    expect(text).toContain('Release by')
    expect(text).not.toContain('was to be released')
  })
  it('is said to be over when it is', async () => {
    const text = await words(-2 * hour)
    expect(text).toContain('and is late, 2 h ago: sign now, or say what holds it up.')
    expect(text).not.toContain('Release by')
  })
})
