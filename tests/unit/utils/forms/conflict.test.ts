import { describe, expect, it } from 'vitest'
import { conflicts, onTop } from '../../../../utils/forms/conflict'
import { draftOf, type FormField } from '../../../../utils/forms/fields'

const fields: FormField[] = [
  { name: 'tag', label: 'tag', type: 'text' },
  { name: 'role', label: 'role', type: 'text' },
  { name: 'flags', label: 'flags', type: 'many', options: [{ value: 'gravity', label: 'can fall' }, { value: 'press', label: 'presses' }] },
]
const before = draftOf(fields, { tag: 'LID-01.Z', role: 'seat', flags: ['gravity'] })
const mine = { ...before, role: 'seat lid' }
const theirs = { tag: 'LID-01.Y', role: 'seat', flags: ['gravity', 'press'] }

describe('edited meanwhile', () => {
  it('shows what was read, what stands there now, and what is written here', () => {
    expect(conflicts(fields, before, mine, theirs)).toEqual([
      { name: 'tag', label: 'tag', before: 'LID-01.Z', theirs: 'LID-01.Y', mine: 'LID-01.Z' },
      { name: 'flags', label: 'flags', before: 'can fall', theirs: 'can fall, presses', mine: 'can fall' },
    ])
  })

  it('keeps mine on top of theirs, and never undoes theirs where nothing was written here', () => {
    expect(onTop(fields, before, mine, theirs)).toEqual({ tag: 'LID-01.Y', role: 'seat lid', flags: ['gravity', 'press'] })
  })

  it('is nothing where only the rev moved', () => {
    expect(conflicts(fields, before, mine, { tag: 'LID-01.Z', role: 'seat', flags: ['gravity'] })).toEqual([])
  })
})
