import { describe, expect, it } from 'vitest'
import { plantFile, settingsFile } from '../../../../../scripts/demo-files'
import { entryLoss } from '../../../../../shared/diff/entry-loss'
import { nameplateSchema } from '../../../../../shared/settings/nameplate'
import { readSettings } from '../../../../../shared/settings/read'
import { writeEntryCsv } from '../../../../../shared/settings/entry-table/write-entry'

const plate = plantFile().nameplates.find(({ model }) => model === 'HL40-200V')!
const tags = plantFile().axes.filter(({ unit }) => unit.model === plate.model).map(({ tag }) => tag)
function fileOf(tag: string) {
  const read = readSettings(Buffer.from(JSON.stringify(settingsFile(tag))))
  if (!read.ok) throw new Error(JSON.stringify(read.errors))
  return read.value.file
}

describe('the entry table of the invented HL40-200V', () => {
  it('is a sound nameplate', () => {
    expect(nameplateSchema.safeParse(plate).error).toBeUndefined()
    expect(tags.length).toBeGreaterThan(3)
  })

  it.each(tags)('holds the file of %s without a loss', (tag) => {
    expect(entryLoss(fileOf(tag), plate)).toEqual({ rounded: [], lost: [], fault: null })
  })

  it('has the numbers that stand on the sheet at the machine', () => {
    const lines = writeEntryCsv(fileOf('LID-02.Z'), plate).split('\r\n')
    expect(lines).toEqual(expect.arrayContaining(['K-001;Positive direction;0;', 'K-006;Homing method;2;', 'K-005;Home offset;0,45;mm', 'K-043;Node address;26;']))
  })
})
