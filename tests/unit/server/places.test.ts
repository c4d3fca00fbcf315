import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Vault } from '../../../server/database/client'
import { parseLeaf } from '../../../shared/trail/entry'
import { listLog } from '../../../server/services/log/log'
import { changeAxis, registerAxis } from '../../../server/services/places/axes'
import { changeLine, listLines, registerLine } from '../../../server/services/places/lines'
import { changeMachine, listMachines, registerMachine } from '../../../server/services/places/machines'
import { changeSite, listSitesPage, readSite, registerSite } from '../../../server/services/places/sites'
import { codeOf } from '../../support/codes'
import { personActor, smallPlant } from '../../support/plant'
import { freshVault } from '../../support/vault'

let vault: Vault
let remove: () => void
let plant: ReturnType<typeof smallPlant>
beforeEach(() => {
  ({ vault, remove } = freshVault())
  plant = smallPlant(vault)
})
afterEach(() => { remove() })

const newest = () => parseLeaf(listLog(vault, plant.planner, { limit: 200 }).items.at(-1)?.leaf ?? '')

describe('places', () => {
  it('are edited with the rev that was read, and logged whole', () => {
    const site = changeSite(vault, plant.planner, plant.siteId, { rev: 1, fourEyes: false, watched: ['dwell'] })
    expect(site).toMatchObject({ rev: 2, fourEyes: false, watched: ['dwell'], name: 'Larkfield Preserves' })
    expect(newest()).toMatchObject({ act: 'site-changed', subject: { kind: 'site', id: plant.siteId }, state: { rev: 2, fourEyes: false, releaseHours: 24 }, actor: { kind: 'person', id: plant.planner.id } })
  })

  it('hold the scan of the controller with the machine: known, changed, and no longer known', () => {
    const scan = (controllerScanMs: number | null, rev: number) => changeMachine(vault, plant.planner, plant.machineId, { rev, controllerScanMs })
    expect(listMachines(vault, plant.planner, {}).items[0]).toMatchObject({ controllerScanMs: null })
    expect(scan(2.5, 1)).toMatchObject({ rev: 2, controllerScanMs: 2.5 })
    expect(newest()).toMatchObject({ act: 'machine-changed', state: { controllerScanMs: 2.5 } })
    expect(changeMachine(vault, plant.planner, plant.machineId, { rev: 2, name: 'Lid press B' })).toMatchObject({ controllerScanMs: 2.5 })
    expect(scan(null, 3)).toMatchObject({ controllerScanMs: null })
    expect(registerMachine(vault, plant.planner, { lineId: plant.lineId, name: 'Lid press C', controllerScanMs: 10 }).id).toBeGreaterThan(plant.machineId)
    expect(newest()).toMatchObject({ act: 'machine-registered', state: { controllerScanMs: 10 } })
  })

  it('refuse an edit without a rev, and a stale one with the present state', () => {
    expect(codeOf(() => changeSite(vault, plant.planner, plant.siteId, { name: 'Other' }))).toBe('rev-missing')
    changeSite(vault, plant.planner, plant.siteId, { rev: 1, name: 'Larkfield North' })
    try {
      changeSite(vault, plant.planner, plant.siteId, { rev: 1, name: 'Other' })
      expect.unreachable()
    }
    catch (error) {
      expect(error).toMatchObject({ code: 'edited-meanwhile', details: { current: { rev: 2, name: 'Larkfield North' } } })
    }
    expect(readSite(vault, plant.siteId).name).toBe('Larkfield North')
  })

  it('refuse a name twice in one place, whatever its case', () => {
    expect(codeOf(() => registerSite(vault, plant.planner, { name: 'LARKFIELD preserves', timeZone: 'UTC' }))).toBe('taken')
    expect(codeOf(() => registerLine(vault, plant.planner, { siteId: plant.siteId, name: 'jar LINE 1' }))).toBe('taken')
    expect(codeOf(() => registerAxis(vault, plant.planner, { machineId: plant.machineId, tag: 'lid-02.z', axisKind: 'linear' }))).toBe('taken')
  })

  it('refuse a time zone that is none', () => {
    expect(codeOf(() => registerSite(vault, plant.planner, { name: 'Moon', timeZone: 'Moon/Tranquility' }))).toBe('time-zone')
  })

  it('of other sites are not there for people with site bounds', () => {
    const other = registerSite(vault, plant.planner, { name: 'Northfield', timeZone: 'UTC' }).id
    const otherLine = registerLine(vault, plant.planner, { siteId: other, name: 'Line' }).id
    const bound = personActor(vault, 'Ada Lindqvist', ['planner'], [other])
    expect(listSitesPage(vault, bound, {}).items.map(({ name }) => name)).toEqual(['Northfield'])
    expect(listLines(vault, bound, {}).items.map(({ id }) => id)).toEqual([otherLine])
    expect(listMachines(vault, bound, {}).items).toEqual([])
    expect(codeOf(() => registerLine(vault, bound, { siteId: plant.siteId, name: 'Mine' }))).toBe('not-found')
    expect(codeOf(() => changeLine(vault, bound, otherLine, { rev: 1, siteId: plant.siteId }))).toBe('not-found')
    expect(codeOf(() => changeMachine(vault, bound, plant.machineId, { rev: 1, lineId: plant.lineId }))).toBe('not-found')
    expect(codeOf(() => registerAxis(vault, bound, { machineId: plant.machineId, tag: 'X', axisKind: 'linear' }))).toBe('not-found')
    expect(codeOf(() => registerSite(vault, bound, { name: 'Mine', timeZone: 'UTC' }))).toBe('site-bounds')
    expect(codeOf(() => listLog(vault, bound, {}))).toBe('site-bounds')
  })

  it('are listed by page, each once', () => {
    for (let number = 2; number <= 7; number += 1) registerLine(vault, plant.planner, { siteId: plant.siteId, name: `Jar line ${number}` })
    const seen: string[] = []
    let cursor: string | undefined
    do {
      const page = listLines(vault, plant.planner, { limit: 3, cursor })
      expect(page.items.length).toBeLessThanOrEqual(3)
      seen.push(...page.items.map(({ name }) => name))
      cursor = page.next ?? undefined
    } while (cursor !== undefined)
    expect(seen).toEqual(['Jar line 1', 'Jar line 2', 'Jar line 3', 'Jar line 4', 'Jar line 5', 'Jar line 6', 'Jar line 7'])
    expect(codeOf(() => listLines(vault, plant.planner, { cursor: 'x; DROP' }))).toBe('input')
  })

  it('filter lists by what they stand in', () => {
    expect(listMachines(vault, plant.planner, { siteId: plant.siteId }).items).toHaveLength(1)
    expect(listMachines(vault, plant.planner, { siteId: plant.siteId + 1 }).items).toEqual([])
    expect(listMachines(vault, plant.planner, { lineId: plant.lineId }).items).toHaveLength(1)
  })
})

describe('an axis', () => {
  it('takes a new tag and stays the same axis', () => {
    const axis = changeAxis(vault, plant.planner, plant.axisId, { rev: 1, tag: 'LID-03.Z', flags: ['press', 'gravity', 'press'] })
    expect(axis).toMatchObject({ id: plant.axisId, tag: 'LID-03.Z', rev: 2, flags: ['gravity', 'press'], status: 'never-read' })
    expect(newest()).toMatchObject({ act: 'axis-changed', state: { tag: 'LID-03.Z', flags: ['gravity', 'press'] } })
  })

  it('loses its duty and interval by null, and keeps what is not named', () => {
    const duty = { moves: [0, 1], cycleTime: 1800 }
    changeAxis(vault, plant.planner, plant.axisId, { rev: 1, duty, uploadEveryHours: 24, role: 'lid press' })
    expect(changeAxis(vault, plant.planner, plant.axisId, { rev: 2, duty: null, uploadEveryHours: null })).toMatchObject({ duty: null, uploadEveryHours: null, role: 'lid press' })
  })
})
