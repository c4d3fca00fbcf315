import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import { AxisStrip } from '#components'
import { stripWords, worstWeight } from '~/utils/strip-words'

describe('the words of a strip', () => {
  it('names the known-good it is in line with', () => {
    expect(stripWords('in-line', undefined, 14)).toBe('in line with known-good v14')
    expect(stripWords('in-line')).toBe('in line')
  })

  it('counts by weight, heaviest first, and leaves out what there is none of', () => {
    expect(stripWords('off', { harm: 6, motion: 2, text: 2 })).toBe('off: 6 harm, 2 motion, 2 text')
    expect(stripWords('off', { harm: 0, motion: 2, text: 0 })).toBe('off: 2 motion')
    expect(stripWords('off', { harm: 0, motion: 0, text: 0 })).toBe('off')
  })

  it('has words for what is missing', () => {
    expect(stripWords('never-read')).toBe('no upload')
    expect(stripWords('unmarked')).toBe('no known-good')
    expect(stripWords('new')).toBe('new')
  })

  it('takes the heaviest weight there is', () => {
    expect(worstWeight({ harm: 1, motion: 9, text: 0 })).toBe('harm')
    expect(worstWeight({ harm: 0, motion: 0, text: 3 })).toBe('text')
    expect(worstWeight({ harm: 0, motion: 0, text: 0 })).toBeUndefined()
  })
})

describe('the strip', () => {
  const bars = async (props: InstanceType<typeof AxisStrip>['$props']) => {
    const strip = await mountSuspended(AxisStrip, { props })
    return { strip, upper: strip.find('.upper'), lower: strip.find('.lower'), hollow: strip.findAll('.hollow') }
  }

  it('stands in line: both strokes at the same place', async () => {
    const { upper, lower } = await bars({ state: 'in-line' })
    expect(lower.attributes('x')).toBe(upper.attributes('x'))
  })

  it('goes farther off the heavier the weight, right for more, left for less', async () => {
    const at = async (weight: 'harm' | 'motion' | 'text', sense: 'more' | 'less') => Number((await bars({ state: 'off', weight, sense })).lower.attributes('x'))
    expect([await at('text', 'more'), await at('motion', 'more'), await at('harm', 'more')]).toEqual([8, 10, 12])
    expect([await at('text', 'less'), await at('motion', 'less'), await at('harm', 'less')]).toEqual([4, 2, 0])
  })

  it('misses the lower stroke where nothing was ever uploaded, the upper where something is new', async () => {
    const never = await bars({ state: 'never-read' })
    expect([never.upper.exists(), never.lower.exists()]).toEqual([true, false])
    const fresh = await bars({ state: 'new' })
    expect([fresh.upper.exists(), fresh.lower.exists()]).toEqual([false, true])
  })

  it('is hollow without a known-good', async () => {
    const { hollow, upper } = await bars({ state: 'unmarked', size: 64 })
    expect(hollow).toHaveLength(2)
    expect(upper.exists()).toBe(false)
  })

  it('is a picture with a name where it has words, and is passed over where words stand beside it', async () => {
    const named = (await bars({ state: 'off', weight: 'harm', label: 'off: 6 harm' })).strip
    expect(named.attributes()).toMatchObject({ 'role': 'img', 'aria-label': 'off: 6 harm' })
    expect(named.attributes('aria-hidden')).toBeUndefined()
    const mute = (await bars({ state: 'in-line' })).strip
    expect(mute.attributes('aria-hidden')).toBe('true')
    expect(mute.attributes('role')).toBeUndefined()
  })
})
