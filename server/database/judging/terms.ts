import { max, count } from 'drizzle-orm'
import { nameplateRevision } from '../nameplate/table'
import { prepared, type VaultDb } from '../prepared'
import { rule, ruleEnd } from '../rule/table'
import { waiver, waiverEnd } from '../waiver/table'

const queries = prepared(db => ({
  nameplate: db.select({ at: max(nameplateRevision.id) }).from(nameplateRevision).prepare(),
  rule: db.select({ at: max(rule.id) }).from(rule).prepare(),
  ruleEnd: db.select({ at: count() }).from(ruleEnd).prepare(),
  waiver: db.select({ at: max(waiver.id) }).from(waiver).prepare(),
  waiverEnd: db.select({ at: count() }).from(waiverEnd).prepare(),
}))

/** Another text whenever a nameplate, a site rule or a waiver was added or ended: what was judged before may be judged otherwise now. */
export function termsStamp(db: VaultDb): string {
  const { nameplate, rule, ruleEnd, waiver, waiverEnd } = queries(db)
  return [nameplate, rule, ruleEnd, waiver, waiverEnd].map(query => query.get()?.at ?? 0).join('.')
}
