import { sql } from 'drizzle-orm'
import { prepared, type VaultDb } from '../prepared'
import { spareFit, type SpareFitRow } from './table'

const place = sql.placeholder

const queries = prepared(db => ({
  all: db.select().from(spareFit).prepare(),
  put: db.insert(spareFit).values({ axisId: place('axisId'), kind: place('kind'), terms: place('terms'), fits: place('fits') })
    .onConflictDoUpdate({ target: [spareFit.axisId, spareFit.kind], set: { terms: sql`excluded.terms`, fits: sql`excluded.fits` } }).prepare(),
}))

export const readSpareFits = (db: VaultDb): SpareFitRow[] => queries(db).all.all()

/** In the place of what was worked out before. */
export function putSpareFit(db: VaultDb, row: SpareFitRow): void {
  queries(db).put.run({ ...row })
}
