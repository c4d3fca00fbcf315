import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { LetterKind } from '../../../../shared/api/letters'
import { letter } from '../../../../server/database/schema'
import { openPost } from '../../../../server/mail/open-post'
import type { Post } from '../../../../server/mail/post'
import { queueOverdueDigests } from '../../../../server/services/letters/overdue-digest'
import { chooseLetter, ownLetters, watchPlace } from '../../../../server/services/letters/own'
import { sendDue } from '../../../../server/services/letters/send'
import { makeRule } from '../../../../server/services/rules/rules'
import { takeCheckpoint } from '../../../../server/services/trail/trail'
import { openFindingsPlant, type FindingsPlant } from '../../../support/findings-plant'
import { startMailServer, type MailServer } from '../../../support/mail-server'
import { day, iso, start } from '../../../support/vault-plant'

/* What happens in a plant, and the letters that leave for it: from the act to the mail server. */

let plant: FindingsPlant
let mail: MailServer
let post: Post

beforeEach(async () => {
  mail = await startMailServer()
  plant = openFindingsPlant()
  post = openPost(plant.vault.folder, mail.url, null)
  plant.vault.sqlite.prepare('UPDATE axis SET upload_every_hours = 24 WHERE id = ?').run(plant.axisId)
  watchPlace(plant.vault, plant.ines, { scope: 'axis', scopeId: plant.axisId, watched: true })
})
afterEach(async () => {
  post.close()
  await mail.close()
  plant.close()
})

const kinds = ['watched-change', 'finding-opened', 'overdue-digest', 'checkpoint'] as const satisfies readonly LetterKind[]

/** A limit raised over a rule, a file that does not come, a day that ends. */
function happen(): void {
  makeRule(plant.vault, plant.runa, { scope: 'axis', scopeId: plant.axisId, field: 'thrustLimit', max: 45, reason: 'jars crack' })
  plant.upload({ thrustLimit: 55, speedLimit: 500 })
  plant.now = start + 3 * day + 60 * 60_000
  queueOverdueDigests(plant.vault)
  takeCheckpoint(plant.vault)
}
const rows = () => plant.vault.db.select().from(letter).orderBy(letter.id).all()

describe('letters', () => {
  it('leave for a watched change, a finding, overdue axes and the day’s checkpoint, each to who has it', async () => {
    happen()
    await sendDue(plant.vault, post, 'https://marks.larkfield.example')
    const read = await mail.read()
    const told = read.map(({ to, subject, text }) => ({ to: (to as { text: string }).text.replace(/.*<(.*)>/, '$1'), subject: subject ?? '', text: text ?? '' }))
    const one = (subject: RegExp) => told.filter(each => subject.test(each.subject))
    expect(one(/LID-02\.Z.*thrust limit 38 → 55 %/)).toMatchObject([{ to: 'ines.okafor@larkfield.example' }])
    expect(one(/finding/i).filter(({ to }) => to.startsWith('ines'))).not.toEqual([])
    expect(one(/overdue/i)).toMatchObject([{ to: 'runa.haldersen@larkfield.example', text: expect.stringContaining('LID-02.Z') as string }])
    const [checkpoint] = one(/checkpoint/i)
    expect(checkpoint?.to).toBe('ines.okafor@larkfield.example')
    expect(checkpoint?.text).toMatch(/witnessmark\/[0-9a-f]{12}\n\d+\n/)
    expect(new Set(rows().map(({ kind }) => kind))).toEqual(new Set(kinds))
    expect(rows().every(({ state }) => state === 'sent')).toBe(true)
  })

  it.each(kinds)('of the kind %s are declined on one’s own page, and then none leaves', (kind) => {
    const reader = kind === 'overdue-digest' ? plant.runa : plant.ines
    expect(ownLetters(plant.vault, reader).choices.find(choice => choice.kind === kind)?.wanted).toBe(true)
    chooseLetter(plant.vault, reader, { kind, wanted: false })
    happen()
    expect(rows().filter(row => row.kind === kind && row.personId === reader.id)).toEqual([])
  })

  it('that wait are judged again when they leave: who left, or lost the site, gets none', async () => {
    happen()
    const there = plant.machineAt('Other works').siteId
    plant.vault.sqlite.prepare('UPDATE person SET site_ids = ? WHERE id = ?').run(JSON.stringify([there]), plant.ines.id)
    plant.vault.sqlite.prepare('UPDATE person SET ended_at = ? WHERE id = ?').run(iso(plant.now), plant.runa.id)
    await sendDue(plant.vault, post, 'https://marks.larkfield.example')
    expect(mail.taken).toEqual([])
    expect(new Set(rows().map(({ state }) => state))).toEqual(new Set(['dropped']))
  })
})
