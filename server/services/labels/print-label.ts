import type { LabelSize } from '#server/database/label/table'
import { labelQueries } from '#server/database/label/queries'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import { Refusal } from '#shared/errors/refusal'
import { refreshAxisState } from '../axes/axis-state'

/** Keeps that a label with the axis' tag of today was printed. */
export function recordLabel(vault: Vault, actor: PersonActor, axisId: number, { size }: { readonly size: LabelSize }): { id: number } {
  return vault.write(actor, (write) => {
    const place = judgingQueries(vault.db).axis.get({ id: axisId })
    if (!place) throw new Refusal('not-found', 'There is no such axis.')
    const row = { axisId, tag: place.axis.tag, size, at: write.now, byPerson: actor.id }
    const id = labelQueries(vault.db).insert(row)
    write.log({ act: 'label-printed', id, state: { id, ...row } })
    refreshAxisState(vault.db, axisId)
    return { id }
  })
}
