import { minus, plus } from '../motion/exact'
import { answers } from './answers'
import { quantity } from './format'
import { atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { warn, unknown } = answers('start-timing')

/** Shorter than this, inputs of a drive rarely follow, in ms: common practice, no source. */
const leastInPractice = 4

const times = { selectSettleTime: 'The settle time of the select inputs', startPulseTime: 'The start pulse' } as const
const fields = Object.keys(times) as (keyof typeof times)[]

export const startTiming: Rule = {
  id: 'start-timing',
  title: 'Timing of the start',
  reason: 'A drive that reads its select inputs before they stand starts another move, and one that misses the start pulse starts none.',
  formula: 'selectSettleTime, startPulseTime >= inputFilterTime + one controller scan where known, and >= 4 ms (common practice, no source)',
  levels: ['warn', 'unknown'],
  applies: ({ content: { setup } }) => (setup.selectInputs ?? 0) > 0 || fields.some(field => setup[field] !== undefined),
  judge,
}

function judge({ content: { setup }, nameplate, axis: { controllerScan } }: JudgeInput): CheckResult[] {
  const filter = nameplate?.inputFilterTime
  const least = filter === undefined ? undefined : plus(filter, controllerScan ?? 0)
  const results = fields.flatMap((field) => {
    const value = setup[field]
    return value === undefined ? [] : tooShort(field, value, least, filter, controllerScan)
  })
  const missing = [...fields.filter(field => setup[field] === undefined), ...filter === undefined ? ['nameplate.inputFilterTime'] : []]
  return missing.length === 0 ? results : [...results, unknown('The timing of the start', missing, fields.map(atSetup))]
}

function tooShort(field: keyof typeof times, value: number, least?: number, filter?: number, scan?: number): CheckResult[] {
  const story = `${times[field]} of ${quantity(value, 'ms')} is`
  if (least !== undefined && filter !== undefined && value < least) {
    const parts = scan === undefined ? `the input filter of ${quantity(filter, 'ms')}` : `input filter and controller scan, ${quantity(filter, 'ms')} + ${quantity(scan, 'ms')} = ${quantity(least, 'ms')}`
    return [warn([atSetup(field)], `${story} ${quantity(minus(least, value), 'ms')} shorter than ${parts}.`,
      { value, least, filter, ...scan === undefined ? {} : { scan } })]
  }
  return value < leastInPractice
    ? [warn([atSetup(field)], `${story} below the ${quantity(leastInPractice, 'ms')} that inputs need in practice.`, { value, least: leastInPractice })]
    : []
}
