import type { z } from 'zod'
import type { previewAnswer, UploadFields } from '#shared/api/uploads'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { Refusal } from '#shared/errors/refusal'
import { waivedOnWire } from '../waivers/accepted'
import { changesOnWire } from '../wire'
import { planUpload, readSent } from './plan-upload'
import { normalisedOnWire } from './store-version'
import type { SentFile } from './store-parts'

/** What an upload of this file would become now. Writes nothing; an unreadable file is refused with its errors and kept nowhere. */
export function previewUpload(vault: Vault, actor: Actor, sent: SentFile, fields: UploadFields): z.infer<typeof previewAnswer> {
  const plan = planUpload(vault.db, actor, readSent(vault.db, sent.bytes, fields), fields, Date.parse(vault.now()))
  if (plan.outcome === 'unreadable') {
    throw new Refusal('settings-unreadable', plan.errors[0]?.message ?? 'The file cannot be read.', { errors: plan.errors, more: plan.more })
  }
  if (plan.outcome === 'unplaced') return { outcome: 'tray', problem: plan.unplaced.problem, detail: plan.unplaced.detail }
  const { id, tag } = plan.placed.place.axis
  if (plan.outcome === 'sighting') return { outcome: 'sighting', axis: { id, tag }, number: plan.current.number }
  return {
    outcome: 'version', axis: { id, tag }, number: plan.number, late: plan.late, clockDoubtful: plan.placed.times.clockDoubtful,
    changes: changesOnWire(plan.changes), renumbered: [...plan.renumbered], checks: waivedOnWire(vault.db, id, plan.judgement, () => plan.ingested.content, vault.now()),
    normalised: normalisedOnWire(plan.ingested.normalised),
  }
}
