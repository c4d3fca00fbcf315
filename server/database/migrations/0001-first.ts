import { flag, immutable, instant, sha256, undeletable } from './sql'

const people = `
CREATE TABLE person (
  id INTEGER PRIMARY KEY,
  rev INTEGER NOT NULL DEFAULT 1,
  name TEXT NOT NULL,
  email TEXT NOT NULL COLLATE NOCASE UNIQUE,
  roles TEXT NOT NULL,
  site_ids TEXT NOT NULL,
  ${flag('shared')},
  password_hash TEXT,
  ${instant('password_set_at', 'NULL')},
  ${instant('made_at')},
  ${instant('ended_at', 'NULL')},
  ${instant('last_sign_in_at', 'NULL')}
) STRICT;

CREATE TABLE session (
  id_hash TEXT PRIMARY KEY,
  person_id INTEGER NOT NULL REFERENCES person (id),
  ${flag('panel')},
  peer TEXT NOT NULL,
  ${instant('made_at')},
  ${instant('seen_at')},
  ${instant('ended_at', 'NULL')}
) STRICT, WITHOUT ROWID;
CREATE INDEX session_person ON session (person_id);

CREATE TABLE token (
  id INTEGER PRIMARY KEY,
  name TEXT NOT NULL,
  ${sha256('secret_hash')} UNIQUE,
  scopes TEXT NOT NULL,
  site_ids TEXT NOT NULL,
  owner_id INTEGER NOT NULL REFERENCES person (id),
  made_by INTEGER NOT NULL REFERENCES person (id),
  ${instant('made_at')},
  ${instant('ends_at')},
  ${instant('ended_at', 'NULL')},
  ${instant('last_used_at', 'NULL')}
) STRICT;
CREATE INDEX token_owner ON token (owner_id);

-- Columns as the throttling library wants them.
CREATE TABLE throttle (
  key TEXT PRIMARY KEY,
  points INTEGER NOT NULL DEFAULT 0,
  expire INTEGER
) STRICT, WITHOUT ROWID;

CREATE TABLE idempotency (
  actor TEXT NOT NULL,
  key_hash TEXT NOT NULL,
  route TEXT NOT NULL,
  body_hash TEXT NOT NULL,
  status INTEGER NOT NULL,
  answer TEXT NOT NULL,
  ${instant('at')},
  PRIMARY KEY (actor, key_hash)
) STRICT, WITHOUT ROWID;
CREATE INDEX idempotency_age ON idempotency (at);

CREATE TABLE setting (
  key TEXT PRIMARY KEY,
  value TEXT NOT NULL,
  ${instant('changed_at')}
) STRICT, WITHOUT ROWID;
${undeletable('person', 'token')}`

const places = `
CREATE TABLE site (
  id INTEGER PRIMARY KEY,
  rev INTEGER NOT NULL DEFAULT 1,
  name TEXT NOT NULL COLLATE NOCASE UNIQUE,
  time_zone TEXT NOT NULL,
  four_eyes INTEGER NOT NULL DEFAULT 1 CHECK (four_eyes IN (0, 1)),
  release_hours INTEGER NOT NULL DEFAULT 24,
  known_good_months INTEGER NOT NULL DEFAULT 24,
  watched TEXT NOT NULL DEFAULT '[]',
  ${instant('made_at')}
) STRICT;

CREATE TABLE line (
  id INTEGER PRIMARY KEY,
  rev INTEGER NOT NULL DEFAULT 1,
  site_id INTEGER NOT NULL REFERENCES site (id),
  name TEXT NOT NULL COLLATE NOCASE,
  ${instant('made_at')},
  UNIQUE (site_id, name)
) STRICT;

CREATE TABLE machine (
  id INTEGER PRIMARY KEY,
  rev INTEGER NOT NULL DEFAULT 1,
  line_id INTEGER NOT NULL REFERENCES line (id),
  name TEXT NOT NULL COLLATE NOCASE,
  ${instant('made_at')},
  UNIQUE (line_id, name)
) STRICT;

CREATE TABLE axis (
  id INTEGER PRIMARY KEY,
  rev INTEGER NOT NULL DEFAULT 1,
  machine_id INTEGER NOT NULL REFERENCES machine (id),
  tag TEXT NOT NULL COLLATE NOCASE UNIQUE CHECK (length(tag) BETWEEN 1 AND 32),
  axis_kind TEXT NOT NULL CHECK (axis_kind IN ('linear', 'rotary')),
  role TEXT NOT NULL DEFAULT '',
  flags TEXT NOT NULL DEFAULT '[]',
  bus TEXT NOT NULL DEFAULT '',
  upload_every_hours INTEGER,
  duty TEXT,
  ${instant('made_at')}
) STRICT;
CREATE INDEX axis_machine ON axis (machine_id);

CREATE TABLE unit (
  id INTEGER PRIMARY KEY,
  rev INTEGER NOT NULL DEFAULT 1,
  serial TEXT NOT NULL COLLATE NOCASE,
  channel INTEGER,
  model TEXT NOT NULL,
  firmware TEXT,
  actuator_serial TEXT,
  actuator_model TEXT,
  location TEXT NOT NULL DEFAULT '',
  state TEXT NOT NULL CHECK (state IN ('spare', 'fitted', 'failed', 'repair', 'scrapped')),
  site_id INTEGER REFERENCES site (id),
  ${instant('made_at')}
) STRICT;
CREATE UNIQUE INDEX unit_serial ON unit (serial, ifnull(channel, 0));
CREATE INDEX unit_model ON unit (model);
CREATE INDEX unit_state ON unit (state);

-- From including, to not including: a unit may go in at the very instant that another came out.
CREATE TABLE fitting (
  id INTEGER PRIMARY KEY,
  axis_id INTEGER NOT NULL REFERENCES axis (id),
  unit_id INTEGER NOT NULL REFERENCES unit (id),
  ${instant('from_at')},
  ${instant('to_at', 'NULL')},
  ${instant('made_at')},
  CHECK (to_at IS NULL OR to_at >= from_at)
) STRICT;
CREATE INDEX fitting_axis ON fitting (axis_id, from_at);
CREATE INDEX fitting_unit ON fitting (unit_id, from_at);
CREATE TRIGGER fitting_no_overlap BEFORE INSERT ON fitting
WHEN EXISTS (
  SELECT 1 FROM fitting WHERE (axis_id = NEW.axis_id OR unit_id = NEW.unit_id)
  AND (to_at IS NULL OR to_at > NEW.from_at) AND (NEW.to_at IS NULL OR from_at < NEW.to_at)
)
BEGIN SELECT RAISE(ABORT, 'overlaps: the axis or the unit is taken in that time'); END;
CREATE TRIGGER fitting_only_closed BEFORE UPDATE ON fitting
WHEN OLD.to_at IS NOT NULL OR NEW.to_at IS NULL OR NEW.id IS NOT OLD.id OR NEW.axis_id IS NOT OLD.axis_id
  OR NEW.unit_id IS NOT OLD.unit_id OR NEW.from_at IS NOT OLD.from_at OR NEW.made_at IS NOT OLD.made_at
BEGIN SELECT RAISE(ABORT, 'immutable: a fitting is opened once and closed once'); END;
${undeletable('site', 'line', 'machine', 'axis', 'unit', 'fitting')}`

const terms = `
CREATE TABLE nameplate_revision (
  id INTEGER PRIMARY KEY,
  model TEXT NOT NULL,
  revision INTEGER NOT NULL CHECK (revision > 0),
  nameplate TEXT NOT NULL,
  ${instant('made_at')},
  made_by INTEGER NOT NULL REFERENCES person (id),
  UNIQUE (model, revision)
) STRICT;
${immutable('nameplate_revision', ['id'], ['model', 'revision'])}

CREATE TABLE rule (
  id INTEGER PRIMARY KEY,
  scope TEXT NOT NULL CHECK (scope IN ('site', 'machine', 'axis')),
  scope_id INTEGER NOT NULL,
  field TEXT NOT NULL,
  min REAL,
  max REAL,
  fixed TEXT,
  reason TEXT NOT NULL,
  ${instant('made_at')},
  made_by INTEGER NOT NULL REFERENCES person (id),
  CHECK (min IS NOT NULL OR max IS NOT NULL OR fixed IS NOT NULL)
) STRICT;
CREATE INDEX rule_scope ON rule (scope, scope_id);
${immutable('rule', ['id'])}

CREATE TABLE rule_end (
  rule_id INTEGER PRIMARY KEY REFERENCES rule (id),
  ${instant('at')},
  by_person INTEGER NOT NULL REFERENCES person (id),
  reason TEXT NOT NULL
) STRICT;
${immutable('rule_end', ['rule_id'])}`

const evidence = `
-- bytes: as they came, zlib. peer: the address they came from.
CREATE TABLE upload (
  id INTEGER PRIMARY KEY,
  ${sha256('sha256')},
  size INTEGER NOT NULL,
  bytes BLOB NOT NULL,
  form TEXT NOT NULL CHECK (form IN ('json', 'csv')),
  name TEXT,
  ${instant('received_at')},
  person_id INTEGER NOT NULL REFERENCES person (id),
  token_id INTEGER REFERENCES token (id),
  peer TEXT NOT NULL
) STRICT;
CREATE INDEX upload_hash ON upload (sha256);
${immutable('upload', ['id'])}

-- text: the canonical text, zlib; hash: SHA-256 of that text before compression.
CREATE TABLE content (
  id INTEGER PRIMARY KEY,
  ${sha256('hash')} UNIQUE,
  size INTEGER NOT NULL,
  text BLOB NOT NULL
) STRICT;
${immutable('content', ['id'], ['hash'])}

-- file: what the file says besides content (unit, exportedAt, exportedBy, note, readings) and the receipt of reading it.
CREATE TABLE version (
  id INTEGER PRIMARY KEY,
  axis_id INTEGER NOT NULL REFERENCES axis (id),
  number INTEGER NOT NULL CHECK (number > 0),
  unit_id INTEGER NOT NULL REFERENCES unit (id),
  upload_id INTEGER NOT NULL REFERENCES upload (id),
  content_id INTEGER NOT NULL REFERENCES content (id),
  base_id INTEGER REFERENCES version (id),
  occasion TEXT NOT NULL CHECK (occasion IN ('commissioning', 'routine', 'as-found', 'as-left', 'read-back')),
  ${instant('captured_at')},
  ${instant('received_at')},
  ${flag('clock_doubtful')},
  order_at TEXT NOT NULL GENERATED ALWAYS AS (iif(clock_doubtful = 1, received_at, captured_at)) VIRTUAL,
  ${flag('late')},
  reason TEXT,
  work_order TEXT,
  changed_by TEXT,
  allowed_by TEXT,
  stored_by INTEGER NOT NULL REFERENCES person (id),
  stored_by_token INTEGER REFERENCES token (id),
  engine TEXT NOT NULL,
  copy_hash TEXT NOT NULL,
  scribe_code TEXT NOT NULL,
  model TEXT NOT NULL,
  firmware TEXT,
  harm INTEGER NOT NULL,
  motion INTEGER NOT NULL,
  text INTEGER NOT NULL,
  file TEXT NOT NULL,
  UNIQUE (axis_id, number)
) STRICT;
CREATE INDEX version_order ON version (axis_id, order_at, number);
CREATE INDEX version_content ON version (content_id);
${immutable('version', ['id'], ['axis_id', 'number'])}

CREATE TABLE version_void (
  version_id INTEGER PRIMARY KEY REFERENCES version (id),
  ${instant('at')},
  by_person INTEGER NOT NULL REFERENCES person (id),
  reason TEXT NOT NULL
) STRICT;
${immutable('version_void', ['version_id'])}

CREATE TABLE sighting (
  id INTEGER PRIMARY KEY,
  axis_id INTEGER NOT NULL REFERENCES axis (id),
  version_id INTEGER NOT NULL REFERENCES version (id),
  ${sha256('upload_sha256')},
  name TEXT,
  ${instant('captured_at')},
  ${instant('received_at')},
  person_id INTEGER NOT NULL REFERENCES person (id),
  token_id INTEGER REFERENCES token (id),
  peer TEXT NOT NULL
) STRICT;
CREATE INDEX sighting_axis ON sighting (axis_id, received_at);
CREATE INDEX sighting_version ON sighting (version_id, received_at);
${immutable('sighting', ['id'])}

-- before, after, affects: JSON; NULL = was not or is not set. Every index ends in the key, so that paging is a range scan.
CREATE TABLE change (
  version_id INTEGER NOT NULL REFERENCES version (id),
  seq INTEGER NOT NULL,
  section TEXT NOT NULL,
  field TEXT NOT NULL,
  row INTEGER,
  at TEXT NOT NULL,
  before TEXT,
  after TEXT,
  unit TEXT,
  delta REAL,
  percent REAL,
  points REAL,
  weight TEXT NOT NULL CHECK (weight IN ('harm', 'motion', 'text')),
  ${flag('watched')},
  affects TEXT,
  PRIMARY KEY (version_id, seq)
) STRICT, WITHOUT ROWID;
CREATE INDEX change_field ON change (section, field, version_id, seq);
CREATE INDEX change_weight ON change (weight, version_id, seq);
${immutable('change', ['version_id', 'seq'])}

CREATE TABLE check_set (
  id INTEGER PRIMARY KEY,
  version_id INTEGER NOT NULL REFERENCES version (id),
  rule_set TEXT NOT NULL,
  nameplate_revision_id INTEGER REFERENCES nameplate_revision (id),
  ${instant('judged_at')},
  judged TEXT NOT NULL,
  not_applicable TEXT NOT NULL,
  stop INTEGER NOT NULL,
  warn INTEGER NOT NULL,
  note INTEGER NOT NULL,
  unknown INTEGER NOT NULL
) STRICT;
CREATE INDEX check_set_version ON check_set (version_id, id);
${immutable('check_set', ['id'])}

CREATE TABLE check_result (
  check_set_id INTEGER NOT NULL REFERENCES check_set (id),
  seq INTEGER NOT NULL,
  rule TEXT NOT NULL,
  level TEXT NOT NULL CHECK (level IN ('stop', 'warn', 'note', 'unknown')),
  at TEXT NOT NULL,
  message TEXT NOT NULL,
  "values" TEXT NOT NULL,
  missing TEXT,
  PRIMARY KEY (check_set_id, seq)
) STRICT, WITHOUT ROWID;
${immutable('check_result', ['check_set_id', 'seq'])}

-- fields: what was sent beside the file; errors: what was wrong with it. content_id where it could be read.
CREATE TABLE tray (
  id INTEGER PRIMARY KEY,
  upload_id INTEGER NOT NULL REFERENCES upload (id),
  problem TEXT NOT NULL CHECK (problem IN ('serial-unknown', 'not-fitted', 'axis-kind', 'unreadable')),
  detail TEXT NOT NULL,
  errors TEXT NOT NULL DEFAULT '[]',
  more INTEGER NOT NULL DEFAULT 0,
  fields TEXT NOT NULL DEFAULT '{}',
  site_id INTEGER REFERENCES site (id),
  serial TEXT COLLATE NOCASE,
  channel INTEGER,
  model TEXT,
  ${instant('captured_at', 'NULL')},
  content_id INTEGER REFERENCES content (id),
  guess_axis_id INTEGER REFERENCES axis (id),
  guess_why TEXT
) STRICT;
CREATE INDEX tray_site ON tray (site_id, id);
CREATE INDEX tray_serial ON tray (serial, content_id);
${immutable('tray', ['id'])}

CREATE TABLE tray_settled (
  tray_id INTEGER PRIMARY KEY REFERENCES tray (id),
  outcome TEXT NOT NULL CHECK (outcome IN ('assigned', 'discarded')),
  ${instant('at')},
  by_person INTEGER NOT NULL REFERENCES person (id),
  reason TEXT,
  version_id INTEGER REFERENCES version (id),
  sighting_id INTEGER REFERENCES sighting (id)
) STRICT;
${immutable('tray_settled', ['tray_id'])}

-- version_id NULL: no version is known-good. The newest row of an axis holds.
CREATE TABLE known_good (
  id INTEGER PRIMARY KEY,
  axis_id INTEGER NOT NULL REFERENCES axis (id),
  version_id INTEGER REFERENCES version (id),
  ${instant('at')},
  by_person INTEGER NOT NULL REFERENCES person (id),
  meaning TEXT NOT NULL CHECK (meaning IN ('reviewed', 'approved', 'responsibility')),
  note TEXT
) STRICT;
CREATE INDEX known_good_axis ON known_good (axis_id, id);
CREATE INDEX known_good_version ON known_good (version_id, id);
${immutable('known_good', ['id'])}

-- Derived: one row an axis, written by one function, never edited by hand and never evidence.
CREATE TABLE axis_state (
  axis_id INTEGER PRIMARY KEY REFERENCES axis (id),
  status TEXT NOT NULL CHECK (status IN ('in-line', 'off', 'never-read', 'unmarked')),
  off_harm INTEGER NOT NULL,
  off_motion INTEGER NOT NULL,
  off_text INTEGER NOT NULL,
  ${instant('off_since', 'NULL')},
  sense TEXT CHECK (sense IS NULL OR sense IN ('more', 'less')),
  known_good_id INTEGER REFERENCES known_good (id),
  known_good_version_id INTEGER REFERENCES version (id),
  current_version_id INTEGER REFERENCES version (id),
  fitting_id INTEGER REFERENCES fitting (id),
  ${instant('last_upload_at', 'NULL')},
  versions INTEGER NOT NULL,
  sightings INTEGER NOT NULL,
  stop INTEGER NOT NULL,
  warn INTEGER NOT NULL,
  note INTEGER NOT NULL,
  unknown INTEGER NOT NULL
) STRICT;

CREATE TABLE log (
  seq INTEGER PRIMARY KEY,
  leaf TEXT NOT NULL
) STRICT;
CREATE TRIGGER log_no_gap BEFORE INSERT ON log
WHEN NEW.seq IS NOT (SELECT ifnull(max(seq), -1) + 1 FROM log)
BEGIN SELECT RAISE(ABORT, 'gap: a log entry takes the number after the newest'); END;
${immutable('log', ['seq'])}`

export const first = { name: 'first', sql: [people, places, terms, evidence].join('\n') } as const
