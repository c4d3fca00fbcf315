import { sql, type SQL, type SQLWrapper } from 'drizzle-orm'
import type { SiteBounds } from './actor'

/** The value of the placeholder `sites` in a statement that `inBounds` is part of. */
export const boundsText = (sites: SiteBounds): string | null => (sites === null ? null : JSON.stringify(sites))

const sites = sql.placeholder('sites')

/** True for rows whose site the actor sees; rows of no site in particular are seen by all. */
export const inBounds = (siteId: SQLWrapper): SQL => sql`(${sites} IS NULL OR ${siteId} IS NULL OR ${siteId} IN (SELECT value FROM json_each(${sites})))`

/** True where the named placeholder is null, or equals the column: a filter that may be left out. */
export const ifGiven = (column: SQLWrapper, name: string): SQL => sql`(${sql.placeholder(name)} IS NULL OR ${column} = ${sql.placeholder(name)})`
