import { describe, expect, it } from 'vitest'
import { cautions, cautionSources } from '../../../../shared/settings/cautions'

/* What has to be said wherever values leave for a drive; each once, in words that somebody reads with gloves on. */
const said = [
  ['isolate and lock out', /isolate and lock out/i],
  ['stored energy: DC link, springs, air, weight', /stored energy.*DC link, springs, air, weight/i],
  ['block what can fall', /block what can fall/i],
  ['safe torque off does not hold a load', /safe torque off does not hold a load/i],
  ['polarity before power', /polarity.*before power/i],
  ['first motion slow, nobody in reach', /first motion at reduced speed, with nobody in reach/i],
  ['taught values are not copied', /taught are not copied/i],
  ['thrust and speed limits belong to the risk assessment', /thrust and speed limits belong to the machine’s risk assessment/i],
  ['no safety function', /no safety function/i],
  ['the maker’s instructions, local codes and a qualified person decide', /maker’s instructions, local codes and a qualified person decide/i],
] as const

describe('the cautions', () => {
  it.each(said)('say once: %s', (_what, words) => expect(cautions.filter(caution => words.test(caution))).toHaveLength(1))

  it('begin with what comes first at the machine', () => {
    const order = [/lock out/, /can fall/, /polarity/i, /first motion/i].map(words => cautions.findIndex(caution => words.test(caution)))
    expect(order).toEqual([...order].sort((a, b) => a - b))
    expect(order[0]).toBe(0)
  })

  it('are short sentences', () => {
    for (const caution of cautions) {
      expect(caution).toMatch(/^[A-Z].*\.$/)
      for (const sentence of caution.split(/(?<=\.) /)) expect(sentence.split(' ').length, sentence).toBeLessThanOrEqual(16)
    }
  })

  // Headings read in public material, the standards themselves are not free.
  it.each(['ISO 12100', 'ISO 14118', 'IEC 60204-1', 'IEC 61800-5-1', '29 CFR 1910.147'])('name %s', source => expect(cautionSources.split(', ')).toContain(source))
})
