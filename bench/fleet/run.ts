import { writeFileSync } from 'node:fs'
import { parseArgs } from 'node:util'
import type { PersonActor } from '../../server/database/actor'
import { openVault, type Vault } from '../../server/database/client'
import { personQueries } from '../../server/database/person/queries'
import { keepVerification } from '../../server/services/trail/verification'
import type { Figure } from '../figure'
import { buildFleet } from './build'
import { measureGit } from './git'
import { extentOf, measureHistory } from './history'
import { measureHttp } from './http'
import { plansOf, type Plan } from './plans'
import { folderOf, historyAgainstGit, smallLog, wholeFleet, type FleetSize } from './size'
import { measureVerify } from './verify'

/*
 * `npm run bench:fleet` fills a vault of fleet size, once, and measures it; `-- --axes 1000 --versions 50000` for a small try,
 * `--folder FOLDER` to keep it elsewhere, `--fresh` to fill it anew, `--json FILE` to write figures and plans.
 */

const { values } = parseArgs({ options: { axes: { type: 'string' }, versions: { type: 'string' }, folder: { type: 'string' }, fresh: { type: 'boolean' }, json: { type: 'string' } } })

const size = { ...wholeFleet, ...(values.axes ? { axes: Number(values.axes) } : {}), ...(values.versions ? { versions: Number(values.versions) } : {}) }
const folder = values.folder ?? folderOf(size)

async function filled(into: string, wanted: FleetSize): Promise<string> {
  await buildFleet(into, wanted, values.fresh === true, line => console.log(line))
  return into
}

/** On a vault that is closed again afterwards. */
async function on<Answer>(into: string, work: (vault: Vault, auditor: PersonActor) => Answer | Promise<Answer>): Promise<Answer> {
  const vault = openVault(into)
  try {
    const auditor = personQueries(vault.db).names.all().find(({ name }) => name === 'Ines Morel')
    if (!auditor) throw new Error('The plant has no auditor.')
    return await work(vault, { kind: 'person', ...auditor, roles: ['auditor'], sites: null, shared: false, session: null, peer: '' })
  }
  finally {
    vault.close()
  }
}

const figures: Figure[] = []
function told(more: readonly Figure[]): void {
  figures.push(...more)
  for (const { name, value, unit, target, holds } of more) console.log(`${name.padEnd(90)}  ${value.toPrecision(3).padStart(8)} ${unit.padEnd(8)} at most ${target}  ${holds ? 'holds' : 'does not hold'}`)
}

await filled(folder, size)
const plans: Plan[] = await on(folder, plansOf)
for (const { name, plan } of plans.filter(({ holds }) => !holds)) console.log(`${name} walks or sorts: ${plan.join('; ')}`)
const extent = await on(folder, extentOf)
told(await on(folder, measureHistory))
told(await on(await filled(folderOf(historyAgainstGit), historyAgainstGit), measureGit))
told((await measureVerify(await filled(folderOf(smallLog), smallLog))).figures)
const verified = await measureVerify(folder)
told(verified.figures)
// Kept as the server keeps one: it would begin one of its own when it starts, in the way of what is measured.
await on(folder, vault => keepVerification(vault, { ...verified, outcome: 'sound', faults: 0, found: [] }))
await measureHttp(folder, extent, told)
if (values.json) writeFileSync(values.json, `${JSON.stringify({ size, figures, plans }, null, 2)}\n`)
if (plans.some(({ holds }) => !holds)) process.exitCode = 1
