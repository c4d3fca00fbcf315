import { describe, expect, it } from 'vitest'
import { setupFieldNames } from '../../../../shared/settings/fields'
import { moveFieldNames } from '../../../../shared/settings/move-fields'
import { readSettingsText } from '../../../../shared/settings/read'
import { exampleFiles } from '../../../../shared/settings/examples'
import { sortedMoveKeys, sortedSetupNames } from '../../../../shared/settings/sorted-keys'
import { canonicalText } from '../../../../shared/settings/canonical'
import { writeJson } from '../../../../shared/settings/write-json'

describe('keys in canonical order', () => {
  it('are those of a move, its number among them', () => {
    expect(sortedMoveKeys).toEqual(['acceleration', 'approach', 'comment', 'deceleration', 'dwell', 'forceLimit', 'kind', 'label', 'move', 'next', 'pressSpeed', 'speed', 'target', 'turn', 'window'])
    expect([...sortedMoveKeys].sort()).toEqual([...moveFieldNames, 'move'].sort())
  })

  /* RFC 8785, section 3.2.3: by UTF-16 code unit, so that capitals come before small letters: homingMethod before homingSpeed, inPosition… before inertiaRatio. */
  it('are sorted by code unit, not by language', () => {
    expect(new Set(sortedSetupNames)).toEqual(new Set(setupFieldNames))
    for (const names of [sortedSetupNames, sortedMoveKeys]) for (const [index, name] of names.entries()) if (index > 0) expect((names[index - 1] as string) < name, name).toBe(true)
    expect(sortedSetupNames.indexOf('inPositionTime')).toBeLessThan(sortedSetupNames.indexOf('inertiaRatio'))
  })

  it('are the order in which a reader lays its rows and its setup down, whatever the order in the file', () => {
    for (const file of exampleFiles) {
      const backwards = JSON.stringify(JSON.parse(writeJson(file)), (_, value: unknown) =>
        typeof value === 'object' && value !== null && !Array.isArray(value) ? Object.fromEntries(Object.entries(value).reverse()) : value)
      const outcome = readSettingsText(backwards)
      if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors))
      const { content } = outcome.value
      for (const move of content.moves) expect(Object.keys(move)).toEqual(sortedMoveKeys.filter(key => key in move))
      expect(Object.keys(content.setup)).toEqual(sortedSetupNames.filter(name => name in content.setup))
      expect(JSON.stringify({ ...content, extra: {} })).toBe(canonicalText({ ...content, extra: {} }))
    }
  })
})
