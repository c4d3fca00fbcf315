import { immutable, instant } from './sql'

const waivers = `
-- places: JSON Pointers, as the check named them; covers: the values, or what is missing, that it is good for.
CREATE TABLE waiver (
  id INTEGER PRIMARY KEY,
  axis_id INTEGER NOT NULL REFERENCES axis (id),
  rule TEXT NOT NULL,
  places TEXT NOT NULL,
  covers TEXT NOT NULL,
  reason TEXT NOT NULL,
  ${instant('until_at')},
  ${instant('given_at')},
  given_by INTEGER NOT NULL REFERENCES person (id)
) STRICT;
CREATE INDEX waiver_axis ON waiver (axis_id, id);
${immutable('waiver', ['id'])}

CREATE TABLE waiver_end (
  waiver_id INTEGER PRIMARY KEY REFERENCES waiver (id),
  ${instant('at')},
  by_person INTEGER NOT NULL REFERENCES person (id),
  reason TEXT NOT NULL
) STRICT;
${immutable('waiver_end', ['waiver_id'])}

-- Of the newest judgement of the current version: level and end of each result that a waiver covers, JSON.
ALTER TABLE axis_state ADD COLUMN accepted TEXT NOT NULL DEFAULT '[]';`

export const second = { name: 'waivers', sql: waivers } as const
