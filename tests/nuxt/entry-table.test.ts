import { mockNuxtImport, mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises, type VueWrapper } from '@vue/test-utils'
import { readBody } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import KitDialog from '~/components/axis/KitDialog.vue'
import VersionFiles from '~/components/axis/VersionFiles.vue'
import EntryTable from '~/components/nameplates/EntryTable.vue'
import NameplateForm from '~/components/nameplates/Form.vue'
import UploadPage from '~/pages/upload.vue'
import { entryDraftOf, judgeEntry, type EntryDraft } from '~/utils/nameplates/entry-table'
import { guessField, pastedRows } from '~/utils/nameplates/entry-paste'
import { revisionChanges } from '~/utils/nameplates/compare'
import type { VersionOne } from '../../shared/api/versions'
import type { Nameplate } from '../../shared/settings/nameplate'
import { axis, today } from '../support/axis-answers'
import { liftFile, liftLines, liftPlate, liftTable } from '../support/entry-table'

const session = { me: { id: 1, name: 'Runa Haldersen', roles: ['planner'], sites: [], empty: false }, may: () => true, forget: () => {}, renew: async () => {} }
mockNuxtImport('useSession', () => () => session)

let bodies: Record<string, unknown>[] = []
const record = { id: 4, model: liftPlate.model, revision: 2, rev: 2, madeAt: '2026-11-01T08:00:00.000Z', madeBy: 'Runa Haldersen', nameplate: liftPlate, units: 3 }
registerEndpoint('/api/nameplates/4', { method: 'PATCH', handler: async (event) => {
  bodies.push(await readBody(event) as Record<string, unknown>)
  return { ...record, id: 5, revision: 3, rev: 3 }
} })
registerEndpoint('/api/nameplates', () => ({ items: [record], next: null }))
registerEndpoint('/api/axes/7/kit', { method: 'POST', handler: async (event) => {
  bodies.push(await readBody(event) as Record<string, unknown>)
  return 'No.;Parameter;Value;Unit'
} })
registerEndpoint('/api/units', () => ({ items: [], next: null }))
registerEndpoint('/api/people/names', () => ({ items: [] }))
registerEndpoint('/api/judging-context', () => ({ problem: 'serial-unknown', registered: null, axis: null, current: null, knownGood: null, nextNumber: 1, nameplate: null, rules: [] }))

const pressed = async (mounted: VueWrapper, words: string) => {
  const found = mounted.findAll('button').find(button => button.text().includes(words))
  if (!found) throw new Error(`no button ${words}`)
  await found.trigger('click')
  await flushPromises()
}
const labelled = (mounted: VueWrapper, words: string) => {
  const label = mounted.findAll('label').find(one => one.text().startsWith(words))
  return mounted.get(`[id="${label?.attributes('for')}"]`)
}
const choose = async (mounted: VueWrapper, lines: readonly string[], name = 'sample.csv') => {
  const input = mounted.findAll('input[type="file"]').at(0)!
  Object.defineProperty(input.element, 'files', { value: [new File([lines.join('\r\n')], name)], configurable: true })
  await input.trigger('change')
  await flushPromises()
}

beforeEach(() => {
  bodies = []
})

describe('the form of an entry table', () => {
  it('holds what the table says, there and back', () => {
    expect(judgeEntry(entryDraftOf(liftTable)!, 'linear').table).toEqual(liftTable)
  })

  it('says what is wrong at its row, blank rows aside', () => {
    const draft = entryDraftOf(liftTable)!
    const blank = { number: '', name: '', field: '', unit: '', factor: '', step: '', digits: '', rounding: '', words: '', none: '' }
    const wrong: EntryDraft = { ...draft, parameters: [blank, ...draft.parameters.map(row => row.number === 'K-003' ? { ...row, unit: 'kg' } : row)] }
    expect(judgeEntry(wrong, 'linear').findings).toEqual([{ part: 'parameters', row: 4, message: 'kg does not fit softLimitMin: here fit mm, µm, cm, m, in.' }])
    expect(judgeEntry({ ...draft, columns: { ...draft.columns, value: 'three' } }, 'linear').table).toBeUndefined()
  })

  it('takes rows from a pasted list and guesses fields from their names', () => {
    expect(pastedRows('Number\tName\nK-003\tSoft limit, min\t\tmm\t\t0.1\t1\nK-040\tBrake\tbrakeFitted\t\t\t\t\ttrue=1, false=0', 'linear')).toMatchObject([
      { number: 'K-003', name: 'Soft limit, min', field: 'softLimitMin', unit: 'mm', step: '0.1', digits: '1' }, { number: 'K-040', field: 'brakeFitted', words: 'true=1, false=0' },
    ])
    expect(guessField('Homing speed', 'linear')).toBe('homingSpeed')
    expect(guessField('Colour of the lid', 'linear')).toBe('')
  })

  it('compares revisions row by row', () => {
    const after = { ...liftPlate, entryTable: { ...liftTable, parameters: liftTable.parameters.map(entry => entry.number === 'K-003' ? { ...entry, step: 0.5 } : entry) } }
    expect(revisionChanges(liftPlate, after)).toEqual([{ key: 'entry/K-003, step', label: 'K-003, step', before: 0.1, after: 0.5, unit: '' }])
  })
})

describe('trying a table on a sample', () => {
  const mount = (draft = entryDraftOf(liftTable)!) => mountSuspended(EntryTable, { props: { modelValue: draft, model: liftPlate.model, axisKind: 'linear', judged: judgeEntry(draft, 'linear') } })

  it('shows the values that it holds', async () => {
    const mounted = await mount()
    await choose(mounted, [...liftLines.slice(0, 13), 'K-099;New;7;', ...liftLines.slice(13)])
    await vi.waitFor(() => expect(mounted.text()).toContain('sample.csv reads: 7 setup values, 1 zone, 2 moves.'))
    expect(mounted.text()).toContain('Serial LT10-26-0001')
    expect(mounted.text()).toContain('It does not hold the time: asked for on upload.')
    expect(mounted.text()).toContain('kept as the drive’s own: K-017, K-099')
    expect(mounted.text()).toContain('184.5')
  })

  it('shows what is wrong, by line', async () => {
    const mounted = await mount()
    await choose(mounted, liftLines.map(line => line.startsWith('K-003') ? 'K-003;Soft limit min;low;mm' : line))
    await vi.waitFor(() => expect(mounted.text()).toContain('line 6, column 22'))
    expect(mounted.text()).toContain('low is no number')
  })

  it('waits for a table that holds', async () => {
    const draft = entryDraftOf(liftTable)!
    const mounted = await mount({ ...draft, parameters: [{ ...draft.parameters[0]!, field: 'colour' }] })
    expect(mounted.text()).toContain('colour is no field of a linear axis.')
    await choose(mounted, liftLines)
    await vi.waitFor(() => expect(mounted.text()).toContain('is read as soon as the table holds'))
  })
})

describe('a table begun from a sample', () => {
  const begun = async (lines: readonly string[], name?: string) => {
    const mounted = await mountSuspended(EntryTable, { props: { model: liftPlate.model, axisKind: 'linear' } })
    await choose(mounted, lines, name)
    return mounted
  }

  it('is proposed from what the sample shows, and tried on it at once', async () => {
    const mounted = await begun(liftLines, 'lift.csv')
    await vi.waitFor(() => expect(mounted.emitted('update:modelValue')).toHaveLength(1))
    const draft = mounted.emitted('update:modelValue')?.[0]?.[0] as EntryDraft
    expect(draft).toMatchObject({ delimiter: ';', decimal: 'comma', header: 'Backup of drive\nNo.;Parameter;Value;Unit' })
    await mounted.setProps({ modelValue: draft, judged: judgeEntry(draft, 'linear') })
    expect(mounted.text()).toContain('Fields were guessed from the names in lift.csv: look each of them through')
    expect(mounted.text()).toContain('"A" is none of absolute, relative, press.')
  })

  it('is not begun from a file that is no list', async () => {
    const mounted = await begun(['A letter', 'without cells'], 'letter.txt')
    await vi.waitFor(() => expect(mounted.get('[role="alert"]').text()).toBe('letter.txt is no list of lines with cells: make the table by hand.'))
    expect(mounted.emitted('update:modelValue')).toBeUndefined()
  })
})

describe('the nameplate form', () => {
  it('sends the whole table when a row was edited, and reads a sample by the edit before it is kept', async () => {
    const mounted = await mountSuspended(NameplateForm, { props: { record } })
    await mounted.get('input[aria-label="Step, row 4"]').setValue('0.5')
    await choose(mounted, liftLines)
    await vi.waitFor(() => expect(mounted.text()).toContain('sample.csv reads'))
    await mounted.get('form').trigger('submit')
    await vi.waitFor(() => expect(mounted.emitted('done')).toEqual([[5]]))
    expect(bodies).toEqual([{ rev: 2, entryTable: { ...liftTable, parameters: liftTable.parameters.map(entry => entry.number === 'K-003' ? { ...entry, step: 0.5 } : entry) } }])
  })

  it('takes the table out', async () => {
    const mounted = await mountSuspended(NameplateForm, { props: { record } })
    await pressed(mounted, 'Take the entry table out')
    await mounted.get('form').trigger('submit')
    await vi.waitFor(() => expect(bodies).toEqual([{ rev: 2, entryTable: null }]))
  })
})

describe('the drive’s own list', () => {
  const content = (setup: object) => ({ axisKind: 'linear' as const, zones: liftFile.zones, moves: liftFile.moves, extra: liftFile.extra, setup: { ...liftFile.setup, ...setup } })
  const kit = async (setup: object, nameplate: Nameplate) => {
    const mounted = await mountSuspended(KitDialog, { props: { open: true, axis, content: content(setup), number: 14, nameplate } })
    const select = () => [...document.querySelectorAll<HTMLSelectElement>('[role="dialog"] select')].at(-1)!
    await vi.waitFor(() => expect(select().options.length).toBeGreaterThan(1))
    return { mounted, select: select() }
  }
  const chosen = async (select: HTMLSelectElement) => {
    select.selectedIndex = [...select.options].findIndex(option => option.text.startsWith('The drive’s own list'))
    select.dispatchEvent(new Event('change'))
    await flushPromises()
  }

  it('is a form of the kit, and says what the steps of the drive change', async () => {
    const { mounted, select } = await kit({ speedLimit: 253 }, liftPlate)
    await chosen(select)
    expect(document.body.textContent).toContain('By the steps of the drive: speed limit 253 becomes 250.')
    document.querySelector<HTMLInputElement>('[role="dialog"] input[type="checkbox"]')?.click()
    await flushPromises()
    ;[...document.querySelectorAll('button')].find(button => button.textContent?.trim() === 'Take the kit')?.click()
    await vi.waitFor(() => expect(document.body.textContent).toContain('LID-03.Z-v14-kit-list.csv is in your downloads'))
    expect(bodies).toEqual([{ form: 'entry', cautionsRead: true }])
    mounted.unmount()
  })

  it('says what the table has no place for', async () => {
    const { mounted, select } = await kit({ jogSpeed: 25 }, liftPlate)
    await chosen(select)
    expect(document.body.textContent).toContain('It has no place for jog speed.')
    mounted.unmount()
  })

  it('is no form of the kit where the model has no table', async () => {
    const { mounted, select } = await kit({}, { model: 'LT20', axisKind: 'linear', stroke: 200 })
    expect([...select.options].map(option => option.value)).toEqual(['json', 'csv', 'pdf', 'zip'])
    mounted.unmount()
  })

  it('is a form of the file of a version', async () => {
    const hrefs = (mounted: VueWrapper) => mounted.findAll('a[download]').map(link => link.attributes('href'))
    expect(hrefs(await mountSuspended(VersionFiles, { props: { version: today, nameplate: liftPlate } }))).toContain('/api/versions/15/file?form=entry')
    expect(hrefs(await mountSuspended(VersionFiles, { props: { version: today } }))).not.toContain('/api/versions/15/file?form=entry')
  })

  it('says beside that file what its steps round, and what it has no place for', async () => {
    const saying = async (setup: VersionOne['content']['setup']) => (await mountSuspended(VersionFiles, { props: { version: { ...today, content: { ...today.content, setup, zones: [], moves: [], extra: {} } }, nameplate: liftPlate } })).text()
    expect(await saying({ speedLimit: 253 })).toContain('By the steps of the drive: speed limit 253 becomes 250.')
    expect(await saying({ jogSpeed: 25 })).toContain('It has no place for jog speed.')
    expect(await saying({ speedLimit: 250 })).not.toMatch(/steps of the drive|no place for/)
  })
})

describe('the upload page', () => {
  it('reads a drive’s own list by the table that is chosen', async () => {
    const mounted = await mountSuspended(UploadPage)
    await choose(mounted, liftLines, 'lift.csv')
    await vi.waitFor(() => expect(mounted.text()).toContain('Is it a drive’s own list?'))
    expect(mounted.text()).not.toContain('Serial of the unit')
    await labelled(mounted, 'Read from the drive at').setValue('2026-11-30T08:15')
    await pressed(mounted, 'Read it by this entry table')
    await vi.waitFor(() => expect(mounted.text()).toContain('This serial is not registered.'))
    expect(mounted.text()).toContain('LT10-26-0001')
  })
})
