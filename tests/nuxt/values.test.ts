import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import { SettingsBeforeAfter, SettingsLevelMark, SettingsValueText, SettingsWeightCounts } from '#components'

describe('a value', () => {
  it('is cut at the point, so that the fraction has a column of its own', async () => {
    const value = await mountSuspended(SettingsValueText, { props: { value: 12.5, unit: 'ms', fraction: 2 } })
    expect(value.find('.figure').element.firstChild?.textContent).toBe('12')
    expect(value.find('.fraction').text()).toBe('.5')
    expect(value.find('.fraction').classes()).toContain('f2')
    expect(value.find('.u').text()).toBe('ms')
  })

  it('keeps the column where there is no fraction', async () => {
    const value = await mountSuspended(SettingsValueText, { props: { value: 8, unit: 'ms', fraction: 1 } })
    expect(value.find('.fraction').text()).toBe('')
    expect(value.find('.fraction').classes()).toContain('f1')
  })

  it('shows words, on and off, the drive’s own unit, and a dash for nothing', async () => {
    const shown = async (value: unknown) => (await mountSuspended(SettingsValueText, { props: { value: value as string } })).text()
    expect(await shown('hard stop')).toBe('hard stop')
    expect(await shown(true)).toBe('on')
    expect(await shown({ value: 3.25, unit: 'inc' })).toBe('3.25inc')
    expect(await shown(undefined)).toBe('–')
    expect(await shown(-4)).toBe('−4')
    expect(await shown('')).toBe('')
    expect(await shown(false)).toBe('off')
  })
})

describe('before over after', () => {
  it('says both in words and sets the joint off by weight and sense', async () => {
    const pair = await mountSuspended(SettingsBeforeAfter, { props: { before: 38, after: 55, unit: '%', weight: 'harm' } })
    expect(pair.text()).toMatch(/^before 38\s*%, after 55\s*%$/)
    expect(pair.find('.lower').attributes('x')).toBe('12')
    const less = await mountSuspended(SettingsBeforeAfter, { props: { before: 12.5, after: 8, unit: 'ms', weight: 'motion' } })
    expect(less.find('.lower').attributes('x')).toBe('2')
  })

  it('gives both the fraction column of the longer one', async () => {
    const pair = await mountSuspended(SettingsBeforeAfter, { props: { before: 0.05, after: 8, weight: 'motion' } })
    expect(pair.findAll('.fraction').map(fraction => fraction.classes().includes('f2'))).toEqual([true, true])
  })

  it('misses a stroke where the value is new or gone', async () => {
    const fresh = await mountSuspended(SettingsBeforeAfter, { props: { after: 36, weight: 'harm' } })
    expect([fresh.find('.upper').exists(), fresh.find('.lower').exists()]).toEqual([false, true])
    const gone = await mountSuspended(SettingsBeforeAfter, { props: { before: 0.05, weight: 'motion' } })
    expect([gone.find('.upper').exists(), gone.find('.lower').exists()]).toEqual([true, false])
  })
})

describe('counts and levels', () => {
  it('names each weight to those who do not see its mark', async () => {
    const counts = await mountSuspended(SettingsWeightCounts, { props: { counts: { harm: 6, motion: 0, text: 2 } } })
    expect(counts.findAll('.count').map(count => count.text())).toEqual(['harm 6', 'text 2'])
    const none = await mountSuspended(SettingsWeightCounts, { props: { counts: { harm: 0, motion: 0, text: 0 } } })
    expect(none.text()).toBe('none')
  })

  it('writes the level, and how many where there are more than one', async () => {
    expect((await mountSuspended(SettingsLevelMark, { props: { level: 'stop', count: 1 } })).text()).toBe('stop')
    expect((await mountSuspended(SettingsLevelMark, { props: { level: 'warn', count: 3 } })).text()).toMatch(/^warn\s3$/)
  })
})
