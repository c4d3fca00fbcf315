import type { z } from 'zod'
import type { Rule, ruleBody, ruleEndBody } from '#shared/api/places'
import { Refusal } from '#shared/errors/refusal'
import { boundsText } from '#server/database/bounds'
import type { Actor, PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { insertRule, insertRuleEnd, ruleRows } from '#server/database/rule/queries'
import type { RuleRow } from '#server/database/rule/table'
import { afterOf, limitOf, pageOf, type PageQuery } from '../page'
import { assertPlace } from '../places/bounds'
import { assertRuleFits } from './rule-fits'

interface Named extends RuleRow { readonly scopeName: string, readonly maker: string, readonly endedAt: string | null, readonly endedBy: string | null, readonly endReason: string | null }
const ruleOut = ({ maker, ...rest }: Named): Rule => ({ ...rest, madeBy: maker })

export function listRules(vault: Vault, actor: Actor, query: PageQuery) {
  const rows = ruleRows(vault.db).page.all({ after: afterOf(query), limit: limitOf(query) + 1, sites: boundsText(actor.sites) })
  return pageOf(rows, query, ({ id }) => id, ruleOut)
}

function namedRule(vault: Vault, id: number): Named {
  const found = ruleRows(vault.db).named.get({ id })
  if (found === undefined) throw new Refusal('not-found', `There is no rule ${id}.`)
  return found
}

export function makeRule(vault: Vault, actor: PersonActor, body: z.output<typeof ruleBody>): { id: number } {
  assertRuleFits(body)
  return vault.write(actor, (write) => {
    assertPlace(vault, actor, body.scope, body.scopeId, '/scopeId')
    const row = insertRule(vault.db, { ...body, madeAt: write.now, madeBy: actor.id })
    write.log({ act: 'rule-made', id: row.id, state: { ...row, endedAt: null } })
    return { id: row.id }
  })
}

export function endRule(vault: Vault, actor: PersonActor, id: number, { reason }: z.output<typeof ruleEndBody>): Rule {
  return vault.write(actor, (write) => {
    const { scopeName: _name, maker: _maker, endedBy: _by, endReason: _reason, ...before } = namedRule(vault, id)
    if (before.endedAt !== null) throw new Refusal('already-ended', 'This rule has ended already.')
    insertRuleEnd(vault.db, { ruleId: id, at: write.now, byPerson: actor.id, reason })
    write.log({ act: 'rule-ended', id, state: { ...before, endedAt: write.now, endedByPerson: actor.id, endReason: reason } })
    return ruleOut(namedRule(vault, id))
  })
}
