import { and, asc, desc, eq, getTableColumns, gt, sql } from 'drizzle-orm'
import { axisState } from '../axis-state/table'
import { person } from '../person/table'
import { prepared, type VaultDb } from '../prepared'
import { unit } from '../unit/table'
import { version } from '../version/table'
import { nameplateRevision, type NameplateRow } from './table'

const placeholder = sql.placeholder

export const nameplateRows = prepared((db) => {
  const units = sql<number>`(SELECT count(*) FROM ${unit} WHERE ${unit.model} = ${nameplateRevision.model})`
  const named = () => db.select({ ...getTableColumns(nameplateRevision), maker: person.name, units }).from(nameplateRevision).innerJoin(person, eq(person.id, nameplateRevision.madeBy))
  const isNewest = sql`NOT EXISTS (SELECT 1 FROM nameplate_revision later WHERE later.model = ${nameplateRevision.model} AND later.revision > ${nameplateRevision.revision})`
  return {
    byId: db.select().from(nameplateRevision).where(eq(nameplateRevision.id, placeholder('id'))).prepare(),
    /** The newest revision of a model. */
    newest: named().where(eq(nameplateRevision.model, placeholder('model'))).orderBy(desc(nameplateRevision.revision)).limit(1).prepare(),
    /** As it was at an instant; the first one where the model was registered later. */
    at: db.select({ nameplate: nameplateRevision.nameplate }).from(nameplateRevision).where(eq(nameplateRevision.model, placeholder('model')))
      .orderBy(sql`${nameplateRevision.madeAt} > ${placeholder('at')}`, sql`iif(${nameplateRevision.madeAt} > ${placeholder('at')}, ${nameplateRevision.revision}, -${nameplateRevision.revision})`).limit(1).prepare(),
    ofModel: named().where(eq(nameplateRevision.model, placeholder('model'))).orderBy(desc(nameplateRevision.revision)).prepare(),
    /** Axes whose current version was read from a unit of the model. */
    axes: db.select({ axisId: axisState.axisId }).from(axisState).innerJoin(version, eq(version.id, axisState.currentVersionId))
      .innerJoin(unit, eq(unit.id, version.unitId)).where(eq(unit.model, placeholder('model'))).prepare(),
    page: named().where(and(gt(nameplateRevision.id, placeholder('after')), isNewest)).orderBy(asc(nameplateRevision.id)).limit(placeholder('limit')).prepare(),
  }
})

export function insertNameplate(db: VaultDb, values: typeof nameplateRevision.$inferInsert): NameplateRow {
  return db.insert(nameplateRevision).values(values).returning().get()
}
