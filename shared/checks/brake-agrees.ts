import { answers } from './answers'
import { atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, unknown } = answers('brake-agrees')

export const brakeAgrees: Rule = {
  id: 'brake-agrees',
  title: 'Brake as built',
  reason: 'A drive that handles a brake which is not there lets go of the load, and one that knows of none drives against it.',
  formula: 'brakeFitted = brakeFitted on the nameplate',
  levels: ['stop', 'unknown'],
  applies: () => true,
  judge,
}

function judge({ content, nameplate }: JudgeInput): CheckResult[] {
  const set = content.setup.brakeFitted
  const built = nameplate?.brakeFitted
  const at = [atSetup('brakeFitted')]
  if (set === undefined || built === undefined) {
    const missing = [...set === undefined ? ['brakeFitted'] : [], ...built === undefined ? ['nameplate.brakeFitted'] : []]
    return [unknown('Whether drive and unit agree about the brake', missing, at)]
  }
  if (set === built) return []
  const words = set ? 'The drive is set to handle a brake, the unit has none.' : 'The unit has a brake, the drive is set to handle none.'
  return [stop(at, words, { set: String(set), nameplate: String(built) })]
}
