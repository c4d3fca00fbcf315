import type { z } from 'zod'
import type { unitInBody } from '../../shared/api/swaps'
import type { Nameplate } from '../../shared/settings/nameplate'
import type { PersonActor } from '../../server/database/actor'
import { markKnownGood } from '../../server/services/known-good/mark'
import { recordMotion, sayRunning } from '../../server/services/swaps/motion'
import { openSwap } from '../../server/services/swaps/open-swap'
import { makeSafe, readCautions } from '../../server/services/swaps/make-safe'
import { readSwap } from '../../server/services/swaps/read-swap'
import { readBackUnit } from '../../server/services/swaps/read-back'
import { takeUnitIn } from '../../server/services/swaps/unit-in'
import { storeUpload } from '../../server/services/uploads/store-upload'
import { day, iso, minute, openPlant, settingsFile, start, type FileParts, type Plant } from './vault-plant'

/** A lid press whose values are known-good: 400 N, brake, home at the hard stop. */
export const plates: Record<'press' | 'stronger', Nameplate> = {
  press: { model: 'HL40-200V', axisKind: 'linear', stroke: 200, hardMargin: 2, maxSpeed: 500, ratedThrust: 400, peakThrust: 1000, pressForceMin: 5, pressForceMax: 70, maxPressSpeed: 30, brakeFitted: true, brakeCloseTime: 40, brakeHolding: 600, resolution: 0.01, shownDigit: 0.01, maxMoves: 64, maxSelectInputs: 6 },
  stronger: { model: 'HL50-200V', axisKind: 'linear', stroke: 200, hardMargin: 2, maxSpeed: 500, ratedThrust: 640, peakThrust: 1600, pressForceMin: 5, pressForceMax: 70, maxPressSpeed: 30, brakeFitted: true, brakeCloseTime: 40, brakeHolding: 900, resolution: 0.01, shownDigit: 0.01, maxMoves: 64, maxSelectInputs: 6 },
}
export const setup = {
  softLimitMin: 0, softLimitMax: 180, homingMethod: 'hard-stop', homingDirection: 'negative', homingForceLimit: 20, homeOffset: 2, homingSpeed: 20, homingCreepSpeed: 5, thrustLimit: 60, overloadLevel: 90, overloadTime: 500,
  speedLimit: 400, pressSpeed: 20, positionGain: 40, selectInputs: 3, nodeAddress: 7, mountingAngle: 0, payloadMass: 4, inPositionWindow: 0.1, followingErrorWindow: 20, selectSettleTime: 10, startPulseTime: 10,
}
export const moves = [
  { move: 0, kind: 'absolute', target: 0, speed: 200, acceleration: 2000 },
  { move: 1, kind: 'absolute', target: 120, speed: 200, acceleration: 2000, next: 2, dwell: 100 },
  { move: 2, kind: 'press', approach: 130, target: 150, speed: 100, acceleration: 1000, forceLimit: 38 },
]

/** The plant with one marked axis, a spare of the same model and one of another force base. */
export function swapPlant(options: { fourEyes?: boolean } = {}) {
  const plant = openPlant(options)
  const runa = plant.person('Runa Haldersen')
  const tobias = plant.person('Tobias Achterberg', ['technician'])
  const axisId = plant.axis('LID-02.Z')
  const old = plant.unit('SN-0001', { firmware: '2.4' })
  plant.fit(axisId, old, start - 300 * day)
  plant.nameplate(plates.press)
  plant.nameplate(plates.stronger)
  const spare = plant.unit('SN-0002', { firmware: '2.4', siteId: plant.siteId })
  const stronger = plant.unit('SN-0050', { model: 'HL50-200V', firmware: '2.4', siteId: plant.siteId })
  const stored = storeUpload(plant.vault, tobias, { bytes: settingsFile({ setup, moves, exportedAt: iso(plant.now) }), name: null }, {})
  if (stored.outcome !== 'version') throw new Error(JSON.stringify(stored))
  const versionId = stored.answer.version.id
  markKnownGood(plant.vault, runa, versionId, { meaning: 'approved' })
  plant.now += minute
  return { plant, runa, tobias, axisId, old, spare, stronger, versionId, ...actsOf(plant, tobias, axisId) }
}

/** The steps as the technician takes them. */
function actsOf(plant: Plant, tobias: PersonActor, axisId: number) {
  const { vault } = plant
  const later = () => {
    plant.now += minute
  }
  const file = (parts: FileParts = {}) => {
    later()
    return settingsFile({ serial: 'SN-0002', setup, moves, exportedAt: iso(plant.now), ...parts })
  }
  return {
    file,
    open: (replaced: 'unit' | 'drive' | 'actuator' = 'unit') => openSwap(vault, tobias, { axisId, replaced, failure: 'following error, motor hot' }),
    unitIn: (id: number, serial = 'SN-0002', more: Partial<z.output<typeof unitInBody>> = {}) => takeUnitIn(vault, tobias, id, { serial, ...more }),
    cautions: (id: number) => readCautions(vault, tobias, id, { read: true }),
    safe: (id: number) => {
      if (!readSwap(vault.db, id, iso(plant.now)).cautions) readCautions(vault, tobias, id, { read: true })
      return makeSafe(vault, tobias, id, { confirmed: true })
    },
    readBack: (id: number, bytes: Buffer, actor: PersonActor = tobias) => readBackUnit(vault, actor, id, { bytes, name: 'back.json' }, {}),
    motion: (id: number, items: readonly string[] = ['jog', 'enable-loss', 'emergency-stop', 'move-0', 'chain-1']) =>
      recordMotion(vault, tobias, id, { speedPercent: 10, results: items.map(item => ({ item, outcome: 'ok' as const })) }),
    running: (id: number) => sayRunning(vault, tobias, id, {}),
  }
}
