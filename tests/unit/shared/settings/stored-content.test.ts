import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { canonicalText } from '../../../../shared/settings/canonical'
import { exampleFiles } from '../../../../shared/settings/examples'
import { readSettingsText } from '../../../../shared/settings/read'
import { sortedMoveKeys } from '../../../../shared/settings/sorted-keys'
import { contentOfText } from '../../../../shared/settings/stored-content'
import { writeJson } from '../../../../shared/settings/write-json'
import { arbitraryContent } from '../../../support/arbitrary-content'

describe('the content of a canonical text', () => {
  it('is the content that the text was written of', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      expect(contentOfText(canonicalText(content))).toEqual(content)
      expect(canonicalText(contentOfText(canonicalText(content)))).toBe(canonicalText(content))
    }))
  })

  it('has rows of the shape that a reader gives them', () => {
    for (const file of exampleFiles) {
      const read = readSettingsText(writeJson(file))
      if (!read.ok) throw new Error(JSON.stringify(read.errors))
      const stored = contentOfText(canonicalText(read.value.content))
      for (const move of [...read.value.content.moves, ...stored.moves]) expect(Object.keys(move)).toEqual(sortedMoveKeys)
      expect(stored).toEqual(read.value.content)
    }
  })
})
