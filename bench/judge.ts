import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { monitorEventLoopDelay } from 'node:perf_hooks'
import type { PersonActor } from '../server/database/actor'
import { openVault, type Vault } from '../server/database/client'
import { insertPerson } from '../server/database/person/queries'
import { beginRun, readRun } from '../server/services/judging/runs'
import { registerNameplate } from '../server/services/nameplates/nameplates'
import { registerAxis } from '../server/services/places/axes'
import { registerLine } from '../server/services/places/lines'
import { registerMachine } from '../server/services/places/machines'
import { registerSite } from '../server/services/places/sites'
import { makeRule } from '../server/services/rules/rules'
import { openFitting } from '../server/services/units/fittings'
import { registerUnit } from '../server/services/units/units'
import { storeUpload } from '../server/services/uploads/store-upload'
import { judge } from '../shared/checks/judge'
import type { JudgeInput } from '../shared/checks/types'
import type { Nameplate } from '../shared/settings/nameplate'
import { readSettings } from '../shared/settings/read'
import type { Move } from '../shared/settings/types'
import { atMost, median, type Figure } from './figure'
import { fileOf, sampleFile, sampleSerial } from './sample-file'

/*
 * What judging costs: all rules on a table of 64 moves, in CPU time; and a run over every current version of a plant that a
 * new rule hits everywhere, on a real file with full synchronisation. 3.3 ms a version are 300 a second; the disk is waited for
 * once in 16 versions.
 */

const axes = 400
const rounds = 25
const repeats = 40

const nameplate: Nameplate = {
  model: 'HL40-200V', axisKind: 'linear', stroke: 200, hardMargin: 2, maxSpeed: 800, maxAcceleration: 6000, ratedThrust: 640, peakThrust: 1600, forceBase: 'rated-thrust',
  pressForceMin: 10, pressForceMax: 90, maxPressSpeed: 20, resolution: 0.005, shownDigit: 0.01, repeatability: 0.02, lead: 10, movingMass: 1.8, rotorInertia: 0.42,
  maxPayloadLevel: 30, maxPayloadVertical: 12, firstMove: 0, inputFilterTime: 3, brakeFitted: true, brakeCloseTime: 40, brakeHolding: 320,
}

/** The hardest table for what is told of chains: half of its rows begin one, and all of them run through the other half. */
const manyHeads = Array.from({ length: 64 }, (_, move): Move => ({
  move, kind: 'absolute', target: (move * 37 % 1950) / 10, speed: 100 + move * 7 % 400, acceleration: 2000 + move % 5 * 250, window: 0.1, ...(move < 63 ? { next: Math.max(32, move + 1), dwell: 100 } : {}),
}))

function judgeInput(file: Buffer): JudgeInput {
  const outcome = readSettings(file)
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors))
  return {
    content: outcome.value.content, nameplate, axis: { axisKind: 'linear', flags: ['gravity', 'press'] },
    unit: { model: 'HL40-200V', firmware: '2.4' }, registered: { model: 'HL40-200V' },
    rules: [{ id: 1, scope: 'site', field: 'move.speed', max: 450, reason: 'guard' }, { id: 2, scope: 'axis', field: 'thrustLimit', max: 70, reason: 'lids crack' }],
  }
}

/** As a content comes: nothing that was reckoned for the one before can be known of it. */
const another = (input: JudgeInput): JudgeInput => ({ ...input, content: { ...input.content, moves: [...input.content.moves] } })

/** CPU milliseconds a judgement, median of rounds after one to warm up. */
function cpuOfJudging(file: Buffer): number {
  const input = judgeInput(file)
  const spent = Array.from({ length: rounds + 1 }, () => {
    const before = process.cpuUsage()
    for (let index = 0; index < repeats; index += 1) judge(another(input))
    const { user, system } = process.cpuUsage(before)
    return (user + system) / 1000 / repeats
  })
  return median(spent.slice(1))
}

function plantOf(vault: Vault): { actor: PersonActor, siteId: number } {
  const row = insertPerson(vault.db, { name: 'Runa Haldersen', email: 'runa.haldersen@larkfield.example', roles: ['planner'], siteIds: [], madeAt: vault.now() })
  const actor: PersonActor = { kind: 'person', id: row.id, name: row.name, roles: ['planner'], sites: null, shared: false, session: null, peer: '127.0.0.1' }
  const siteId = registerSite(vault, actor, { name: 'Larkfield Preserves', timeZone: 'Europe/Copenhagen' }).id
  const lineId = registerLine(vault, actor, { siteId, name: 'Jar line 1' }).id
  const machineId = registerMachine(vault, actor, { lineId, name: 'Lid press 2' }).id
  registerNameplate(vault, actor, nameplate)
  for (let index = 0; index < axes; index += 1) {
    const serial = `LP-${index}`
    const axisId = registerAxis(vault, actor, { machineId, tag: `LID-${index}.Z`, axisKind: 'linear' }).id
    openFitting(vault, actor, { axisId, unitId: registerUnit(vault, actor, { serial, model: 'HL40-200V' }).id, at: '2020-01-01T00:00:00Z' })
    const bytes = Buffer.from(sampleFile(index, new Date().toISOString()).toString('utf8').replace(sampleSerial, serial))
    const stored = storeUpload(vault, actor, { bytes, name: null }, {})
    if (stored.outcome !== 'version') throw new Error(stored.outcome)
  }
  return { actor, siteId }
}

/** CPU milliseconds a version, and the delay that 95 of 100 others would have met, of a run that changes every judgement. */
async function timeOfRun(vault: Vault, actor: PersonActor): Promise<{ each: number, delay: number }> {
  let fault: unknown
  const loop = monitorEventLoopDelay({ resolution: 5 })
  loop.enable()
  const before = process.cpuUsage()
  const { id } = beginRun(vault, actor, (error) => { fault = error })
  let run = readRun(vault, actor, id)
  while (run.done < run.of && fault === undefined) {
    await new Promise((resolve) => { setTimeout(resolve, 5) })
    run = readRun(vault, actor, id)
  }
  loop.disable()
  if (run.changed.length !== axes) throw new Error(`Of ${axes} versions ${run.changed.length} were judged otherwise.`, { cause: fault })
  const { user, system } = process.cpuUsage(before)
  return { each: (user + system) / 1000 / axes, delay: loop.percentile(95) / 1e6 }
}

/** All rules on 64 moves; a version of a run over many; how long others wait meanwhile. */
export async function measureJudge(): Promise<Figure[]> {
  const folder = mkdtempSync(join(tmpdir(), 'witnessmark-bench-'))
  const vault = openVault(folder)
  try {
    const { actor, siteId } = plantOf(vault)
    makeRule(vault, actor, { scope: 'site', scopeId: siteId, field: 'thrustLimit', max: 70, reason: 'lids crack' })
    const { each, delay } = await timeOfRun(vault, actor)
    return [
      atMost('all rules on 64 moves, CPU', cpuOfJudging(sampleFile(0)), 1, 'ms'),
      atMost('all rules on 64 moves in 32 chains of 33, CPU', cpuOfJudging(fileOf(manyHeads)), 1, 'ms'),
      atMost('a stored version judged again, kept and logged, CPU', each, 3.3, 'ms'),
      atMost('wait of others while versions are judged again, p95', delay, 200, 'ms'),
    ]
  }
  finally {
    vault.close()
    rmSync(folder, { recursive: true })
  }
}
