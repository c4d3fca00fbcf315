import { plantFile } from '../../scripts/demo-files'
import type { Nameplate } from '../../shared/settings/nameplate'
import { writeJson } from '../../shared/settings/write-json'
import type { SwapKit } from '../../shared/api/swaps'
import { schemaName, type Content, type SettingsFile } from '../../shared/settings/types'
import { jsonFile, lidPress, type PickedFile } from './lid-press'
import type { TestServer } from './server'
import { plantOn, type ServerPlant } from './server-plant'
import { admin } from './server'

export interface SwapPlant extends ServerPlant {
  /** An axis whose unit was read and marked known-good. */
  readonly known: (tag: string, serial: string) => Promise<{ axisId: number, unitId: number }>
  readonly spare: (serial: string, model?: string) => Promise<number>
}

/** Of the demo plant; the third is the first with half its stroke. */
const plateOf = (model: string): Nameplate => {
  const found = plantFile().nameplates.find(plate => plate.model === model)
  if (!found) throw new Error(`The demo plant has no ${model}.`)
  return { maxOverloadTime: 1000, ...found }
}
const plates = () => [plateOf('HL40-200V'), plateOf('HL50-200V'), { ...plateOf('HL40-200V'), model: 'HL25-100', stroke: 100 }]

/** The invented plant with nameplates of three models, for tests that swap units. */
export async function swapPlantOn(server: TestServer): Promise<SwapPlant> {
  const plant = await plantOn(server)
  for (const plate of plates()) await plant.post('/api/nameplates', plate)
  return {
    ...plant,
    known: async (tag, serial) => {
      const made = await plant.axis(tag, serial, { flags: ['gravity', 'press'], firmware: '3.12' })
      const { json } = await plant.upload(writeJson(lidPress({ serial })))
      const { id } = (json as unknown as { version: { id: number } }).version
      const marked = await server.call('POST', `/api/versions/${id}/known-good`, { as: plant.as.planner, body: { meaning: 'approved', password: admin.password } })
      if (marked.status !== 201) throw new Error(`not marked: ${marked.text}`)
      return made
    },
    spare: (serial, model = 'HL40-200V') => plant.post('/api/units', { serial, model, firmware: '3.12', state: 'spare', location: 'store A, shelf 1' }),
  }
}

/** What a drive gives back that was written from the kit: its content, with what was taught in it. */
export function gaveBack(kit: SwapKit, told: { readonly serial: string, readonly model?: string, readonly at: string, readonly setup?: Partial<Content['setup']> }): PickedFile {
  const content = kit.content as unknown as Content
  const file: SettingsFile = {
    ...content, schema: schemaName, readings: {}, exportedAt: told.at, setup: { ...content.setup, ...told.setup },
    unit: { serial: told.serial, model: told.model ?? kit.unit.model, firmware: kit.unit.firmware ?? '3.12' },
  }
  return jsonFile(`${told.serial}.json`, file)
}
