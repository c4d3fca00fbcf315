import { flag, immutable, instant, sha256, undeletable } from './sql'

const swaps = `
-- Where a swap stands, derived from its steps. facts: what its steps said and still holds, JSON.
CREATE TABLE swap (
  id INTEGER PRIMARY KEY,
  rev INTEGER NOT NULL,
  axis_id INTEGER NOT NULL REFERENCES axis (id),
  replaced TEXT NOT NULL CHECK (replaced IN ('unit', 'drive', 'actuator')),
  failure TEXT NOT NULL,
  work_order TEXT,
  step TEXT NOT NULL CHECK (step IN ('unit-in', 'safe', 'read-back', 'first-motion', 'running', 'release', 'released', 'abandoned')),
  unit_out_id INTEGER REFERENCES unit (id),
  unit_in_id INTEGER REFERENCES unit (id),
  ${flag('put_back')},
  fit TEXT CHECK (fit IN ('same', 'adjust', 'unfit')),
  source_version_id INTEGER REFERENCES version (id),
  source_mark_id INTEGER REFERENCES known_good (id),
  facts TEXT NOT NULL,
  ${instant('opened_at')},
  opened_by INTEGER NOT NULL REFERENCES person (id),
  ${instant('changed_at')},
  ${instant('running_at', 'NULL')}
) STRICT;
CREATE UNIQUE INDEX swap_open ON swap (axis_id) WHERE step NOT IN ('released', 'abandoned');
CREATE INDEX swap_axis ON swap (axis_id, id);
${undeletable('swap')}

-- said: what the step said, JSON; text: in words, as it is told to the other device.
CREATE TABLE swap_step (
  id INTEGER PRIMARY KEY,
  swap_id INTEGER NOT NULL REFERENCES swap (id),
  rev INTEGER NOT NULL CHECK (rev > 0),
  act TEXT NOT NULL,
  ${instant('at')},
  by_person INTEGER NOT NULL REFERENCES person (id),
  text TEXT NOT NULL,
  said TEXT NOT NULL,
  UNIQUE (swap_id, rev)
) STRICT;
${immutable('swap_step', ['id'], ['swap_id', 'rev'])}

-- Every attempt, those turned away too. verdict, compared, kit_code: of those that were compared.
CREATE TABLE read_back (
  id INTEGER PRIMARY KEY,
  swap_id INTEGER NOT NULL REFERENCES swap (id),
  attempt INTEGER NOT NULL CHECK (attempt > 0),
  rev INTEGER NOT NULL,
  upload_id INTEGER NOT NULL REFERENCES upload (id),
  ${sha256('sha256')},
  version_id INTEGER REFERENCES version (id),
  problem TEXT CHECK (problem IN ('serial', 'model', 'unreadable', 'twice')),
  detail TEXT,
  verdict TEXT CHECK (verdict IN ('identical', 'same', 'differs')),
  compared TEXT,
  kit_code TEXT,
  ${flag('after_first_motion')},
  ${instant('at')},
  by_person INTEGER NOT NULL REFERENCES person (id),
  UNIQUE (swap_id, attempt),
  CHECK ((problem IS NULL) = (version_id IS NOT NULL) AND (version_id IS NULL) = (compared IS NULL))
) STRICT;
CREATE INDEX read_back_version ON read_back (version_id);
${immutable('read_back', ['id'], ['swap_id', 'attempt'])}

-- A key that a model's firmware has no place for, accepted once for all its units.
CREATE TABLE firmware_gap (
  id INTEGER PRIMARY KEY,
  model TEXT NOT NULL,
  firmware TEXT NOT NULL,
  key TEXT NOT NULL,
  swap_id INTEGER NOT NULL REFERENCES swap (id),
  ${instant('at')},
  by_person INTEGER NOT NULL REFERENCES person (id),
  allowed_by TEXT,
  reason TEXT NOT NULL,
  UNIQUE (model, firmware, key)
) STRICT;
${immutable('firmware_gap', ['id'], ['model', 'firmware', 'key'])}

-- The version whose mark this one carries on, where a swap brought the same values to another unit.
ALTER TABLE known_good ADD COLUMN carried_from INTEGER REFERENCES version (id);`

export const swapsStep = { name: 'swaps', sql: swaps } as const
