import { z } from 'zod'
import type { nameplatePatch, NameplateRecord, NameplateRevision } from '#shared/api/places'
import { Refusal } from '#shared/errors/refusal'
import { nameplateSchema, type Nameplate } from '#shared/settings/nameplate'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { insertNameplate, nameplateRows } from '#server/database/nameplate/queries'
import type { NameplateRow } from '#server/database/nameplate/table'
import { refreshAxisState } from '../axes/axis-state'
import { mergePatch } from '../merge-patch'
import { afterOf, limitOf, pageOf, type PageQuery } from '../page'
import { assertRev } from '../rev'

interface Named extends NameplateRow { readonly maker: string, readonly units: number }
const recordOut = ({ maker, madeBy: _by, ...rest }: Named): NameplateRecord => ({ ...rest, rev: rest.revision, madeBy: maker })
const revisionOut = ({ id, revision, madeAt, maker, nameplate }: Named): NameplateRevision => ({ id, revision, madeAt, madeBy: maker, nameplate })

export function listNameplates(vault: Vault, query: PageQuery) {
  const rows = nameplateRows(vault.db).page.all({ after: afterOf(query), limit: limitOf(query) + 1 })
  return pageOf(rows, query, ({ id }) => id, recordOut)
}

function newestOf(vault: Vault, id: number): Named {
  const of = nameplateRows(vault.db).byId.get({ id })
  const found = of && nameplateRows(vault.db).newest.get({ model: of.model })
  if (found === undefined) throw new Refusal('not-found', `There is no nameplate ${id}.`)
  return found
}

/** The newest revision of the model that revision `id` belongs to. */
export const readNameplate = (vault: Vault, id: number): NameplateRecord => recordOut(newestOf(vault, id))

/** All revisions of that model, newest first. */
export const listRevisions = (vault: Vault, id: number): NameplateRevision[] => nameplateRows(vault.db).ofModel.all({ model: newestOf(vault, id).model }).map(revisionOut)

export function registerNameplate(vault: Vault, actor: PersonActor, nameplate: Nameplate): { id: number } {
  return vault.write(actor, () => {
    if (nameplateRows(vault.db).newest.get({ model: nameplate.model }) !== undefined) {
      throw new Refusal('taken', `${nameplate.model} has a nameplate. Change that one; the change becomes its next revision.`, { errors: [{ at: '/model', code: 'taken', message: 'has a nameplate' }] })
    }
    return addRevision(vault, actor, nameplate, 1)
  })
}

/** Adds the revision that differs in what the patch names; null clears a value. `rev` is the revision that was read. */
export function reviseNameplate(vault: Vault, actor: PersonActor, id: number, { rev, ...patch }: z.output<typeof nameplatePatch>): NameplateRecord {
  return vault.write(actor, () => {
    const before = newestOf(vault, id)
    assertRev(rev, before.revision, () => recordOut(before))
    const merged = nameplateSchema.safeParse(mergePatch(before.nameplate, patch))
    if (!merged.success) throw new Refusal('input', z.prettifyError(merged.error), { errors: merged.error.issues.map(({ path, message }) => ({ at: `/${path.join('/')}`, code: 'nameplate', message })) })
    if (merged.data.model !== before.model) throw new Refusal('input', 'The model names the nameplate and does not change. Register the other model.', { errors: [{ at: '/model', code: 'fixed', message: 'does not change' }] })
    return readNameplate(vault, addRevision(vault, actor, merged.data, before.revision + 1).id)
  })
}

function addRevision(vault: Vault, actor: PersonActor, nameplate: Nameplate, revision: number): { id: number } {
  return vault.write(actor, (write) => {
    const row = insertNameplate(vault.db, { model: nameplate.model, revision, nameplate, madeAt: write.now, madeBy: actor.id })
    write.log({ act: 'nameplate-added', id: row.id, state: row })
    for (const { axisId } of nameplateRows(vault.db).axes.all({ model: nameplate.model })) refreshAxisState(vault.db, axisId)
    return { id: row.id }
  })
}
