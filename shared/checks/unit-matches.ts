import { isOlderFirmware } from './firmware'
import { answers } from './answers'
import { atExtra } from './pointers'
import { inWords } from './format'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, warn, unknown } = answers('unit-matches')

export const unitMatches: Rule = {
  id: 'unit-matches',
  title: 'Unit and register',
  reason: 'Settings of one type in a unit of another move a machine by numbers that mean something else there.',
  formula: 'type code and axis kind = registered (only the stem: warn); firmware = the known-good’s (else warn; older and lacking a key that it holds: stop)',
  levels: ['stop', 'warn', 'unknown'],
  applies: () => true,
  judge: input => [...kind(input), ...model(input), ...firmware(input)],
}

function kind({ content, axis }: JudgeInput): CheckResult[] {
  if (content.axisKind === axis.axisKind) return []
  return [stop(['/axisKind'], `The file is for a ${content.axisKind} axis, this axis is ${axis.axisKind}.`,
    { file: content.axisKind, registered: axis.axisKind })]
}

function model({ unit, registered }: JudgeInput): CheckResult[] {
  if (!registered) return [unknown('The type code', ['registered.model'], [], { file: unit.model })]
  if (unit.model === registered.model) return []
  const values = { file: unit.model, registered: registered.model }
  return stem(unit.model) === stem(registered.model)
    ? [warn([], `The file names ${unit.model}, the unit is registered as ${registered.model}: only ${stem(unit.model)} is the same.`, values)]
    : [stop([], `The file names ${unit.model}, the unit is registered as ${registered.model}.`, values)]
}

/** What stands before the first separator of a type code: the build without stroke, voltage and options. */
function stem(model: string): string {
  return model.replace(/[-/._ ].*$/, '')
}

function firmware({ unit, knownGood, content }: JudgeInput): CheckResult[] {
  if (knownGood?.firmware === undefined || unit.firmware === knownGood.firmware) return []
  if (unit.firmware === undefined) return [unknown('The firmware', ['unit.firmware'], [], { knownGood: knownGood.firmware })]
  const values = { file: unit.firmware, knownGood: knownGood.firmware }
  const other = warn([], `The unit runs firmware ${unit.firmware}, the known-good was made with ${knownGood.firmware}.`, values)
  const lacking = keysLacking(content, knownGood.content)
  if (lacking.length === 0 || !isOlderFirmware(unit.firmware, knownGood.firmware)) return [other]
  return [other, stop(lacking.map(({ at }) => at),
    `Firmware ${unit.firmware} is older than the known-good's ${knownGood.firmware} and the file lacks ${inWords(lacking.map(({ key }) => key))}.`,
    { ...values, lacking: lacking.map(({ key }) => key) })]
}

function keysLacking(content: JudgeInput['content'], held: JudgeInput['content']): { key: string, at: string }[] {
  return [
    ...Object.keys(held.setup).filter(key => !Object.hasOwn(content.setup, key)).map(key => ({ key, at: `/setup/${key}` })),
    ...Object.keys(held.extra).filter(key => !Object.hasOwn(content.extra, key)).map(key => ({ key, at: atExtra(key) })),
  ]
}
