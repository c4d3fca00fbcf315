import { immutable, instant } from './sql'

const trail = `
-- Hashes of the complete subtrees of 2^8, 2^16 and 2^24 entries: derived from log, so that a proof needs few rows of it.
CREATE TABLE log_node (
  level INTEGER NOT NULL CHECK (level IN (8, 16, 24)),
  place INTEGER NOT NULL CHECK (place >= 0),
  hash BLOB NOT NULL CHECK (length(hash) = 32),
  PRIMARY KEY (level, place)
) STRICT, WITHOUT ROWID;
${immutable('log_node', ['level', 'place'])}

-- note: the signed text as it was given away.
CREATE TABLE checkpoint (
  id INTEGER PRIMARY KEY,
  size INTEGER NOT NULL,
  note TEXT NOT NULL,
  ${instant('taken_at')}
) STRICT;
${immutable('checkpoint', ['id'])}

-- What each verification of the vault found; found: the first hundred faults, JSON.
CREATE TABLE verification (
  id INTEGER PRIMARY KEY,
  ${instant('begun_at')},
  ${instant('ended_at')},
  outcome TEXT NOT NULL CHECK (outcome IN ('sound', 'damage', 'failed')),
  entries INTEGER NOT NULL,
  rows INTEGER NOT NULL,
  found TEXT NOT NULL,
  faults INTEGER NOT NULL
) STRICT;
${immutable('verification', ['id'])}`

export const trailStep = { name: 'trail', sql: trail } as const
