import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Actor, PersonActor } from '../../../../server/database/actor'
import { letter } from '../../../../server/database/schema'
import { chooseLetter, ownLetters, watchPlace } from '../../../../server/services/letters/own'
import { tellVault, tellWatchers } from '../../../../server/services/letters/queue'
import { postActor } from '../../../../server/services/letters/send'
import type { AxisFacts } from '../../../../server/services/letters/words'
import { parseLeaf } from '../../../../shared/trail/entry'
import { codeOf } from '../../../support/codes'
import { iso, openPlant, start, type Plant } from '../../../support/vault-plant'

let plant: Plant
let axisId: number
let ines: PersonActor
let runa: PersonActor

beforeEach(() => {
  plant = openPlant()
  axisId = plant.axis('LID-02.Z')
  ines = plant.person('Ines Okafor', ['auditor'])
  runa = plant.person('Runa Haldersen', ['planner'])
})
afterEach(() => plant.close())

const released: AxisFacts['swap-released'] = { swapId: 7, at: iso(start), by: 'Runa Haldersen', unitOut: 'A4471', unitIn: 'A5502', knownGood: 12 }
const tell = (actor: Actor = postActor, facts = released) => plant.vault.write(actor, write => tellWatchers(plant.vault.db, write, 'swap-released', axisId, facts))
const letters = () => plant.vault.db.select().from(letter).all()
const watch = (actor: PersonActor, watched = true) => watchPlace(plant.vault, actor, { scope: 'axis', scopeId: axisId, watched })

describe('letters to those who watch', () => {
  it('go to nobody who did not ask', () => {
    expect(tell()).toEqual([])
    expect(letters()).toEqual([])
  })

  it('say what, where and when, with the zone of the site', () => {
    watch(ines)
    expect(tell()).toEqual([ines.id])
    expect(letters()).toMatchObject([{
      personId: ines.id, kind: 'swap-released', axisId, siteIds: [plant.siteId], title: 'LID-02.Z: swap released', path: '/swaps/7', state: 'queued', attempts: 0, nextTryAt: iso(start),
      paragraphs: ['Runa Haldersen released the swap at LID-02.Z (Lid press 1, Jars) on Sun 1 Mar 2026 07:00:00 CET (UTC+1).', 'Unit out A4471, unit in A5502. Known-good is v12.'],
    }])
    expect(letters()[0]?.messageId).toMatch(/^[0-9a-f]{32}@witnessmark$/)
  })

  it.each(['site', 'line', 'machine', 'axis'] as const)('reach who watches the %s', (scope) => {
    const scopeId = { site: plant.siteId, line: 1, machine: plant.machineId, axis: axisId }[scope]
    watchPlace(plant.vault, ines, { scope, scopeId, watched: true })
    expect(tell()).toEqual([ines.id])
  })

  it('come once to who watches the axis and its site', () => {
    watch(ines)
    watchPlace(plant.vault, ines, { scope: 'site', scopeId: plant.siteId, watched: true })
    expect(tell()).toEqual([ines.id])
  })

  it('are written once for one cause, however often they are asked for, and again for another', () => {
    watch(ines)
    expect([tell(), tell(), tell(postActor, { ...released, swapId: 8 })]).toEqual([[ines.id], [], [ines.id]])
    expect(letters()).toHaveLength(2)
  })

  it('leave out who did it, and not who answers for the script that did', () => {
    watch(runa)
    expect(tell(runa)).toEqual([])
    expect(tell(plant.token('nightly', runa))).toEqual([runa.id])
  })

  it('leave out who wants none of the kind, who watches no more, and who was told already', () => {
    watch(ines)
    watch(runa)
    chooseLetter(plant.vault, runa, { kind: 'swap-released', wanted: false })
    expect(tell()).toEqual([ines.id])
    watch(ines, false)
    expect(tell(postActor, { ...released, swapId: 8 })).toEqual([])
    watch(ines)
    plant.vault.write(postActor, write => expect(tellWatchers(plant.vault.db, write, 'swap-released', axisId, { ...released, swapId: 9 }, [ines.id])).toEqual([]))
  })

  it('are gone with the write that was to cause them', () => {
    watch(ines)
    expect(() => plant.vault.write(postActor, (write) => {
      tellWatchers(plant.vault.db, write, 'swap-released', axisId, released)
      throw new Error('the release broke off')
    })).toThrow('broke off')
    expect(letters()).toEqual([])
  })

  it('never go beyond the sites of who watches', () => {
    const elsewhere = plant.machineAt('Other works')
    const bound = plant.person('Tobias Achterberg', ['technician'], [elsewhere.siteId])
    expect(codeOf(() => watch(bound))).toBe('not-found')
    plant.vault.sqlite.prepare('INSERT INTO watch (person_id, scope, scope_id, watched, chosen_at) VALUES (?, ?, ?, 1, ?)').run(bound.id, 'axis', axisId, iso(start))
    expect(tell()).toEqual([])
  })
})

describe('letters to the vault’s own people', () => {
  const note = 'larkfield\n7\nAAAA\n\n— larkfield BBBB\n'
  const checkpoint = () => plant.vault.write(postActor, write => tellVault(plant.vault.db, write, 'checkpoint', { date: '2026-03-01', note }))

  it('the checkpoint goes to auditors of all sites who said nothing, once a day, word for word', () => {
    plant.person('Maud Verhagen', ['auditor'], [plant.siteId])
    expect([checkpoint(), checkpoint()]).toEqual([[ines.id], []])
    expect(letters()).toMatchObject([{ cause: '2026-03-01', path: '/trail' }])
    expect(letters()[0]?.paragraphs.at(-1)).toBe(note)
  })

  it('and to none who declined', () => {
    chooseLetter(plant.vault, ines, { kind: 'checkpoint', wanted: false })
    expect(checkpoint()).toEqual([])
  })

  it('a failed copy is told to administrators, a failed verification to auditors too', () => {
    const marit = plant.person('Marit Lund', ['admin'])
    plant.vault.write(postActor, (write) => {
      expect(tellVault(plant.vault.db, write, 'copy-failed', { at: iso(start), to: 's3', says: 'no room' })).toEqual([marit.id])
      expect(tellVault(plant.vault.db, write, 'verification-failed', { at: iso(start), says: 'entry 12' })).toEqual([ines.id, marit.id])
    })
  })
})

describe('one’s own letters', () => {
  it('list the kinds that roles and sites allow', () => {
    const kinds = (actor: PersonActor) => ownLetters(plant.vault, actor).choices.map(({ kind }) => kind)
    expect(kinds(ines)).toContain('checkpoint')
    expect(kinds(runa)).not.toContain('checkpoint')
    expect(kinds(plant.person('Maud Verhagen', ['auditor'], [plant.siteId]))).not.toContain('checkpoint')
    expect(kinds(runa)).not.toContain('copy-failed')
  })

  it('say what holds without a choice, and what was chosen', () => {
    const wanted = (actor: PersonActor) => ownLetters(plant.vault, actor).choices.find(({ kind }) => kind === 'overdue-digest')?.wanted
    expect([wanted(runa), wanted(ines)]).toEqual([true, false])
    chooseLetter(plant.vault, ines, { kind: 'overdue-digest', wanted: true })
    chooseLetter(plant.vault, runa, { kind: 'overdue-digest', wanted: false })
    expect([wanted(runa), wanted(ines)]).toEqual([false, true])
  })

  it('name the places watched, the widest first', () => {
    watch(ines)
    expect(watchPlace(plant.vault, ines, { scope: 'site', scopeId: plant.siteId, watched: true }).watches).toEqual([
      { scope: 'site', scopeId: plant.siteId, name: 'Larkfield' }, { scope: 'axis', scopeId: axisId, name: 'LID-02.Z' },
    ])
    expect(watch(ines, false).watches.map(({ scope }) => scope)).toEqual(['site'])
  })

  it('refuse a kind of other roles, and places that are not there', () => {
    expect(codeOf(() => chooseLetter(plant.vault, runa, { kind: 'checkpoint', wanted: true }))).toBe('role')
    expect(codeOf(() => watchPlace(plant.vault, ines, { scope: 'axis', scopeId: 99, watched: true }))).toBe('not-found')
  })

  it('stand in the log whole, each under its own subject', () => {
    watch(ines)
    chooseLetter(plant.vault, ines, { kind: 'checkpoint', wanted: false })
    const leaves = plant.vault.sqlite.prepare('SELECT leaf FROM log ORDER BY seq DESC LIMIT 2').pluck().all() as string[]
    expect(leaves.map(leaf => parseLeaf(leaf))).toMatchObject([
      { act: 'letter-chosen', subject: { kind: 'letter-choice', id: 1 }, state: { personId: ines.id, kind: 'checkpoint', wanted: false } },
      { act: 'watch-set', subject: { kind: 'watch', id: 1 }, state: { watched: true } },
    ])
  })
})

describe('what a letter says', () => {
  it('never changes, and no letter goes', () => {
    watch(ines)
    tell()
    for (const column of ['title', 'paragraphs', 'message_id', 'cause', 'made_at']) {
      expect(() => plant.vault.sqlite.prepare(`UPDATE letter SET ${column} = 'x'`).run(), column).toThrow(/never changes/)
    }
    expect(() => plant.vault.sqlite.prepare('DELETE FROM letter').run()).toThrow(/never deleted/)
    expect(() => plant.vault.sqlite.prepare('INSERT OR REPLACE INTO letter SELECT * FROM letter').run()).toThrow(/never deleted/)
  })
})
