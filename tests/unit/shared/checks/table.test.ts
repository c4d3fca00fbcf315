import { existsSync, readdirSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { ruleOf, rules, ruleSetVersion } from '../../../../shared/checks/table'
import { levels } from '../../../../shared/checks/types'

const besideThis = (name: string) => fileURLToPath(new URL(name, import.meta.url))

describe('the rule table', () => {
  it('has each id once and tells the rules in their order', () => {
    expect(rules.map(rule => rule.id)).toEqual([
      'travel-span', 'travel-placed', 'soft-limits-off', 'target-inside', 'relative-step', 'press-path', 'press-force',
      'press-arrives', 'press-hold', 'press-speed', 'thrust-limit', 'overload-plausible', 'speed-limit', 'acceleration-limit',
      'quick-stop-soft', 'speed-reached', 'thrust-needed', 'thrust-rms', 'payload', 'stopping-room', 'following-window', 'window-grid',
      'target-grid', 'chain-target', 'chain-endless', 'chain-after-press', 'select-reach', 'start-timing', 'zone-reach',
      'homing-plausible', 'home-side', 'brake-vertical', 'brake-agrees', 'polarity-flip', 'twin-moves', 'unused-rows', 'unit-matches',
      'force-rescale', 'site-rule', 'extra-range',
    ])
    expect(ruleSetVersion).not.toBe('')
  })

  it.each(rules.map(rule => [rule.id, rule] as const))('%s stands in a file of its name, with a spec', (id) => {
    expect(existsSync(besideThis(`../../../../shared/checks/${id}.ts`))).toBe(true)
    expect(readdirSync(besideThis('.'))).toContain(`${id}.test.ts`)
  })

  it.each(rules.map(rule => [rule.id, rule] as const))('%s tells why it matters and how it reckons', (_id, rule) => {
    for (const text of [rule.title, rule.reason, rule.formula]) expect(text.trim().length).toBeGreaterThan(3)
    expect(rule.reason).toMatch(/^[A-Z].*\.$/)
    expect(rule.levels.length).toBeGreaterThan(0)
    expect(rule.levels).toEqual(levels.filter(level => rule.levels.includes(level)))
  })

  it('finds a rule by its id, and none for an id of another rule set', () => {
    expect(ruleOf('press-path')?.title).toBe('Path of a press')
    expect(ruleOf('no-such-rule')).toBeUndefined()
  })
})
