import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { nameplatePatch } from '../../../shared/api/places'
import type { Vault } from '../../../server/database/client'
import { listNameplates, listRevisions, readNameplate, registerNameplate, reviseNameplate } from '../../../server/services/nameplates/nameplates'
import { codeOf } from '../../support/codes'
import { smallPlant } from '../../support/plant'
import { freshVault } from '../../support/vault'

let vault: Vault
let remove: () => void
let plant: ReturnType<typeof smallPlant>
let id: number
const plate = { model: 'HL40-200V', axisKind: 'linear', stroke: 200, lead: 10, dictionary: { 'K-017': { name: 'ramp', min: 0 }, 'K-018': { weight: 'harm' } } } as const
beforeEach(() => {
  ({ vault, remove } = freshVault())
  plant = smallPlant(vault)
  id = registerNameplate(vault, plant.planner, structuredClone(plate)).id
})
afterEach(() => { remove() })

describe('nameplates', () => {
  it('are revised by what a patch names; null clears, dictionaries merge', () => {
    const patch = nameplatePatch.parse({ rev: 1, lead: null, stroke: 250, dictionary: { 'K-018': null, 'K-017': { min: null, max: 9 }, 'K-019': { carry: 'teach' } } })
    const revised = reviseNameplate(vault, plant.planner, id, patch)
    expect(revised).toMatchObject({ model: 'HL40-200V', revision: 2, rev: 2, units: 1, madeBy: 'Runa Haldersen' })
    expect(revised.nameplate).toEqual({ model: 'HL40-200V', axisKind: 'linear', stroke: 250, dictionary: { 'K-017': { name: 'ramp', max: 9 }, 'K-019': { carry: 'teach' } } })
  })

  it('keep each revision as it was', () => {
    reviseNameplate(vault, plant.planner, id, { rev: 1, stroke: 250 })
    expect(listRevisions(vault, id).map(({ revision, nameplate }) => [revision, nameplate.stroke])).toEqual([[2, 250], [1, 200]])
    expect(readNameplate(vault, id).revision).toBe(2)
    expect(listNameplates(vault, {}).items.map(({ revision }) => revision)).toEqual([2])
  })

  it('refuse a model twice, a stale revision, another model, and a value that cannot be', () => {
    expect(codeOf(() => registerNameplate(vault, plant.planner, { ...plate, dictionary: undefined }))).toBe('taken')
    reviseNameplate(vault, plant.planner, id, { rev: 1, stroke: 250 })
    expect(codeOf(() => reviseNameplate(vault, plant.planner, id, { rev: 1, stroke: 260 }))).toBe('edited-meanwhile')
    expect(codeOf(() => reviseNameplate(vault, plant.planner, id, { stroke: 260 }))).toBe('rev-missing')
    expect(codeOf(() => reviseNameplate(vault, plant.planner, id, { rev: 2, model: 'HR16' }))).toBe('input')
    expect(codeOf(() => reviseNameplate(vault, plant.planner, id, { rev: 2, stroke: null }))).toBe('input')
    expect(codeOf(() => readNameplate(vault, 99))).toBe('not-found')
    expect(nameplatePatch.safeParse({ rev: 2, stroke: -1 }).success).toBe(false)
    expect(nameplatePatch.safeParse({ rev: 2, strok: 1 }).success).toBe(false)
  })
})
