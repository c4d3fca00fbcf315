/*
 * Words that the migrations are written in. A migration already out is compared by hash at every start, so a change here
 * that alters the text of an old one is refused like an edit of the migration itself.
 */

/** A time column: RFC 3339 UTC with milliseconds, so that comparing the texts compares the times. */
export const instant = (name: string, presence: 'NOT NULL' | 'NULL' = 'NOT NULL') =>
  `${name} TEXT ${presence} CHECK (${presence === 'NULL' ? `${name} IS NULL OR ` : ''}(length(${name}) = 24 AND substr(${name}, 24) = 'Z'))`

export const flag = (name: string) => `${name} INTEGER NOT NULL DEFAULT 0 CHECK (${name} IN (0, 1))`

/** A SHA-256, lower-case hex. */
export const sha256 = (name: string) => `${name} TEXT NOT NULL CHECK (length(${name}) = 64)`

const kept = (table: string) => `
CREATE TRIGGER ${table}_no_delete BEFORE DELETE ON ${table}
BEGIN SELECT RAISE(ABORT, 'kept: rows of ${table} are never deleted'); END;`

/** Rows may be edited but never go. With recursive_triggers on, this also stops INSERT OR REPLACE. */
export const undeletable = (...tables: string[]) => tables.map(kept).join('\n')

/**
 * The three triggers of an immutable table. `keys` lists every unique key: INSERT OR IGNORE and upserts over a known row
 * are refused as well, so whoever stores a thing once looks for it first.
 */
export const immutable = (table: string, ...keys: string[][]) => `
CREATE TRIGGER ${table}_no_update BEFORE UPDATE ON ${table}
BEGIN SELECT RAISE(ABORT, 'immutable: rows of ${table} never change'); END;
CREATE TRIGGER ${table}_no_delete BEFORE DELETE ON ${table}
BEGIN SELECT RAISE(ABORT, 'immutable: rows of ${table} are never deleted'); END;
CREATE TRIGGER ${table}_no_replace BEFORE INSERT ON ${table}
WHEN ${keys.map(key => `EXISTS (SELECT 1 FROM ${table} WHERE ${key.map(column => `${column} = NEW.${column}`).join(' AND ')})`).join(' OR ')}
BEGIN SELECT RAISE(ABORT, 'immutable: this row of ${table} is already there'); END;`
