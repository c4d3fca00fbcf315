import { immutable, instant } from './sql'

const findings = `
-- What came of it stands in finding_act; where it stands today in finding_state. site_id NULL: about the vault itself.
CREATE TABLE finding (
  id INTEGER PRIMARY KEY,
  site_id INTEGER REFERENCES site (id),
  cause TEXT NOT NULL CHECK (cause IN ('watched-change', 'stop-check', 'read-back', 'off-known-good', 'unfit', 'axis-disagrees', 'verification')),
  cause_key TEXT NOT NULL,
  title TEXT NOT NULL,
  weight TEXT NOT NULL CHECK (weight IN ('harm', 'motion', 'text')),
  ${instant('opened_at')}
) STRICT;
CREATE INDEX finding_cause ON finding (cause_key, id);
${immutable('finding', ['id'])}

-- changes: the changes that it is about, JSON, as they are told. base_id: what the version was compared with.
CREATE TABLE finding_version (
  id INTEGER PRIMARY KEY,
  finding_id INTEGER NOT NULL REFERENCES finding (id),
  axis_id INTEGER NOT NULL REFERENCES axis (id),
  version_id INTEGER REFERENCES version (id),
  base_id INTEGER REFERENCES version (id),
  says TEXT NOT NULL,
  changes TEXT NOT NULL,
  ${instant('at')}
) STRICT;
CREATE INDEX finding_version_of ON finding_version (finding_id, id);
CREATE INDEX finding_version_axis ON finding_version (axis_id, finding_id);
CREATE INDEX finding_version_version ON finding_version (version_id, finding_id);
${immutable('finding_version', ['id'])}

-- axis_ids, fields: JSON. min, max: of the values, both included.
CREATE TABLE planned_change (
  id INTEGER PRIMARY KEY,
  axis_ids TEXT NOT NULL,
  fields TEXT NOT NULL,
  min REAL,
  max REAL,
  ${instant('from_at')},
  ${instant('until_at')},
  reason TEXT NOT NULL,
  allowed_by TEXT NOT NULL,
  ${instant('made_at')},
  made_by INTEGER NOT NULL REFERENCES person (id),
  CHECK (until_at > from_at)
) STRICT;
${immutable('planned_change', ['id'])}

CREATE TABLE planned_change_end (
  planned_change_id INTEGER PRIMARY KEY REFERENCES planned_change (id),
  ${instant('at')},
  by_person INTEGER NOT NULL REFERENCES person (id),
  reason TEXT NOT NULL
) STRICT;
${immutable('planned_change_end', ['planned_change_id'])}

-- text: the words of an explanation or a reopening. made_by, made_at: who did it and when, as the explainer says.
CREATE TABLE finding_act (
  id INTEGER PRIMARY KEY,
  finding_id INTEGER NOT NULL REFERENCES finding (id),
  kind TEXT NOT NULL CHECK (kind IN ('explained', 'closed', 'reopened')),
  ${instant('at')},
  by_person INTEGER NOT NULL REFERENCES person (id),
  text TEXT,
  made_by TEXT,
  ${instant('made_at', 'NULL')},
  work_order TEXT,
  planned_change_id INTEGER REFERENCES planned_change (id),
  close_as TEXT CHECK (close_as IS NULL OR close_as IN ('accepted', 'put-right')),
  allowed_by TEXT,
  version_id INTEGER REFERENCES version (id),
  CHECK ((kind = 'closed') = (close_as IS NOT NULL)),
  CHECK (kind = 'closed' OR text IS NOT NULL)
) STRICT;
CREATE INDEX finding_act_of ON finding_act (finding_id, id);
CREATE INDEX finding_act_planned ON finding_act (planned_change_id, id) WHERE planned_change_id IS NOT NULL;
${immutable('finding_act', ['id'])}

-- Derived from the acts by one function; lets no second finding of one cause be open.
CREATE TABLE finding_state (
  finding_id INTEGER PRIMARY KEY REFERENCES finding (id),
  cause_key TEXT NOT NULL,
  state TEXT NOT NULL CHECK (state IN ('open', 'explained', 'closed')),
  ${instant('due_at')}
) STRICT;
CREATE UNIQUE INDEX finding_state_cause ON finding_state (cause_key) WHERE state <> 'closed';
CREATE INDEX finding_state_state ON finding_state (state, finding_id);
CREATE INDEX finding_state_due ON finding_state (due_at) WHERE state <> 'closed';`

export const findingsStep = { name: 'findings', sql: findings } as const
