import type { Swap } from '../../shared/api/swaps'
import type { PersonActor } from '../../server/database/actor'
import { listFittings } from '../../server/services/axes/read-axis'
import { makeTextKit, type Kit } from '../../server/services/kit/make-kit'
import type { ReadBackOutcome } from '../../server/services/swaps/read-back'
import { releaseSwap } from '../../server/services/swaps/release'
import type { swapPlant } from './swap-plant'

/* Steps of a swap on the plant of swap-plant.ts, further than one act. */

export type SwapPlant = ReturnType<typeof swapPlant>

export function answered(outcome: ReadBackOutcome) {
  if (!outcome.ok) throw new Error(outcome.refusal.message)
  return outcome.answer
}
export const refused = (outcome: ReadBackOutcome): string => outcome.ok ? 'none' : outcome.refusal.code
/** Serials of the units that sit at the axis now. */
export const sits = ({ plant, axisId }: SwapPlant): string[] => listFittings(plant.vault, axisId).items.filter(({ to }) => to === null).map(({ serial }) => serial)
export const release = ({ plant, runa }: SwapPlant, id: number, more: object = {}, actor: PersonActor = runa): Swap => releaseSwap(plant.vault, actor, id, { meaning: 'approved', ...more })
export const take = ({ plant, tobias, axisId }: SwapPlant, serial?: string): Kit => makeTextKit(plant.vault, tobias, axisId, { serial, form: 'json', cautionsRead: true }).kit

/** Up to a read-back that is identical, with the spare of the same model. */
export function written(here: SwapPlant): Swap {
  const { id } = here.open()
  here.unitIn(id)
  here.safe(id)
  return answered(here.readBack(id, here.file()))
}

/** Up to running, with an as-left version. */
export function running(here: SwapPlant): Swap {
  const { id } = written(here)
  here.motion(id)
  here.readBack(id, here.file())
  return here.running(id)
}
