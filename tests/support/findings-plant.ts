import type { Actor, PersonActor } from '../../server/database/actor'
import { markKnownGood } from '../../server/services/known-good/mark'
import { storeUpload } from '../../server/services/uploads/store-upload'
import type { UploadFields, UploadStored } from '../../shared/api/uploads'
import { day, hour, iso, openPlant, settingsFile, start, type FileParts, type Plant } from './vault-plant'

export interface FindingsPlant extends Plant {
  readonly axisId: number
  readonly runa: PersonActor
  readonly tobias: PersonActor
  readonly ines: PersonActor
  /** An hour later the drive holds this setup; answers the 201. */
  readonly upload: (setup: object, options?: { by?: Actor, fields?: UploadFields, serial?: string, parts?: FileParts, at?: number }) => UploadStored
}

/** LID-02.Z with unit SN-1 and its first version: thrust limit 38 %, marked known-good where asked. */
export function openFindingsPlant({ marked = false, watched = [] as string[] } = {}): FindingsPlant {
  const plant = openPlant({ watched, fourEyes: false })
  const axisId = plant.axis('LID-02.Z')
  plant.fit(axisId, plant.unit('SN-1'), start - 30 * day)
  const people = { runa: plant.person('Runa Haldersen', ['planner']), tobias: plant.person('Tobias Achterberg', ['technician']), ines: plant.person('Ines Okafor', ['auditor']) }
  const upload: FindingsPlant['upload'] = (setup, { by = people.tobias, fields = {}, serial = 'SN-1', parts = {}, at } = {}) => {
    plant.now += hour
    const stored = storeUpload(plant.vault, by, { bytes: settingsFile({ serial, exportedAt: iso(at ?? plant.now), setup, ...parts }), name: null }, fields)
    if (stored.outcome !== 'version') throw new Error(`No version was stored: ${JSON.stringify(stored)}`)
    return stored.answer
  }
  const made = Object.assign(plant, { axisId, ...people, upload })
  const first = upload({ thrustLimit: 38, speedLimit: 500 })
  if (marked) markKnownGood(plant.vault, people.runa, first.version.id, { meaning: 'approved' })
  return made
}
