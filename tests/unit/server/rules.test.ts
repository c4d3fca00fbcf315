import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Vault } from '../../../server/database/client'
import { assertRuleFits } from '../../../server/services/rules/rule-fits'
import { endRule, listRules, makeRule } from '../../../server/services/rules/rules'
import { registerSite } from '../../../server/services/places/sites'
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

describe('site rules', () => {
  it('are named by their place, and end with a reason', () => {
    const ids = (['site', 'machine', 'axis'] as const).map(scope => makeRule(vault, plant.planner, { scope, scopeId: plant[`${scope}Id`], field: 'thrustLimit', max: 40, reason: 'lids crack above' }).id)
    expect(listRules(vault, plant.planner, {}).items.map(({ scopeName }) => scopeName)).toEqual(['Larkfield Preserves', 'Lid press 2', 'LID-02.Z'])
    const ended = endRule(vault, plant.planner, ids[0] ?? 0, { reason: 'new lids' })
    expect(ended).toMatchObject({ max: 40, min: null, fixed: null, madeBy: 'Runa Haldersen', endedBy: 'Runa Haldersen', endReason: 'new lids' })
    expect(codeOf(() => endRule(vault, plant.planner, ids[0] ?? 0, { reason: 'again' }))).toBe('already-ended')
    expect(codeOf(() => endRule(vault, plant.planner, 99, { reason: 'x' }))).toBe('not-found')
  })

  it('of other sites are not there for people with site bounds', () => {
    makeRule(vault, plant.planner, { scope: 'axis', scopeId: plant.axisId, field: 'move.speed', max: 300, reason: 'r' })
    const other = registerSite(vault, plant.planner, { name: 'Northfield', timeZone: 'UTC' }).id
    const bound = personActor(vault, 'Ada Lindqvist', ['planner'], [other])
    expect(listRules(vault, bound, {}).items).toEqual([])
    expect(codeOf(() => makeRule(vault, bound, { scope: 'axis', scopeId: plant.axisId, field: 'thrustLimit', max: 1, reason: 'r' }))).toBe('not-found')
    makeRule(vault, bound, { scope: 'site', scopeId: other, field: 'thrustLimit', max: 40, reason: 'r' })
    expect(listRules(vault, bound, {}).items).toHaveLength(1)
    expect(listRules(vault, plant.planner, {}).items).toHaveLength(2)
  })

  const rule = (fields: object) => () => assertRuleFits({ scope: 'site', scopeId: 1, field: 'thrustLimit', reason: 'r', ...fields })
  it.each([
    [{}], [{ field: 'thrustLimits', max: 1 }], [{ field: 'move.speeed', max: 1 }], [{ field: 'zone.speed', max: 1 }], [{ field: 'speed', max: 1 }], [{ field: 'extra:', max: 1 }],
    [{ min: 5, max: 4 }], [{ fixed: 3, max: 4 }], [{ field: 'move.kind', max: 1 }], [{ field: 'brakeFitted', min: 0 }], [{ fixed: 'strong' }], [{ field: 'toString', max: 1 }], [{ field: 'move.constructor', fixed: 'x' }],
  ])('refuses %j', fields => expect(codeOf(rule(fields))).toBe('input'))
  it.each([
    [{ max: 40 }], [{ min: 4, max: 4 }], [{ fixed: 38 }], [{ field: 'move.speed', max: 300 }], [{ field: 'move.next', fixed: 2 }], [{ field: 'zone.from', min: 0 }],
    [{ field: 'extra:K-017', fixed: 'B' }], [{ field: 'extra:K-017', max: 3 }], [{ field: 'brakeFitted', fixed: true }], [{ field: 'move.kind', fixed: 'press' }],
  ])('takes %j', fields => expect(rule(fields)).not.toThrow())
})
