import { writeFileSync } from 'node:fs'
import { parseArgs } from 'node:util'
import { measureBoard } from './board'
import { measureDiff } from './diff'
import type { Figure } from './figure'
import { measureJudge } from './judge'
import { measureRead } from './read'
import { measureReadiness } from './readiness'
import { measureUpload } from './upload'

/*
 * `npm run bench` prints every figure with its target; `-- --json FILE` writes them too. Peers are measured in the same run.
 */

const { values } = parseArgs({ options: { json: { type: 'string' } } })

const figures: Figure[] = [...await measureDiff(), ...await measureRead(), ...await measureJudge(), ...await measureUpload(), ...await measureBoard(), ...await measureReadiness()]
const width = Math.max(...figures.map(figure => figure.name.length))
for (const figure of figures) {
  console.log(`${figure.name.padEnd(width)}  ${figure.value.toPrecision(3).padStart(8)} ${figure.unit.padEnd(8)} at most ${figure.target}  ${figure.holds ? 'holds' : 'does not hold'}`)
}
if (values.json) writeFileSync(values.json, `${JSON.stringify(figures, null, 2)}\n`)
