import { flag, instant, undeletable } from './sql'

const letters = `
-- What is said never changes; what became of it does. cause: one letter a person and cause, however often it is asked for.
-- site_ids: the sites it speaks of, JSON; axis_id where it is about one. paragraphs: JSON texts, without addresses.
CREATE TABLE letter (
  id INTEGER PRIMARY KEY,
  message_id TEXT NOT NULL UNIQUE,
  person_id INTEGER NOT NULL REFERENCES person (id),
  kind TEXT NOT NULL,
  cause TEXT NOT NULL,
  axis_id INTEGER REFERENCES axis (id),
  site_ids TEXT NOT NULL,
  title TEXT NOT NULL,
  paragraphs TEXT NOT NULL,
  path TEXT NOT NULL,
  ${instant('made_at')},
  state TEXT NOT NULL CHECK (state IN ('queued', 'sent', 'failed', 'dropped')),
  attempts INTEGER NOT NULL DEFAULT 0,
  ${instant('next_try_at', 'NULL')},
  ${instant('leased_until', 'NULL')},
  ${instant('settled_at', 'NULL')},
  problem TEXT,
  UNIQUE (person_id, kind, cause),
  CHECK ((state = 'queued') = (next_try_at IS NOT NULL)),
  CHECK ((state = 'queued') = (settled_at IS NULL))
) STRICT;
CREATE INDEX letter_due ON letter (next_try_at) WHERE state = 'queued';
CREATE INDEX letter_state ON letter (state, id);
CREATE TRIGGER letter_only_moves BEFORE UPDATE ON letter
WHEN ${['id', 'message_id', 'person_id', 'kind', 'cause', 'axis_id', 'site_ids', 'title', 'paragraphs', 'path', 'made_at'].map(column => `OLD.${column} IS NOT NEW.${column}`).join(' OR ')}
BEGIN SELECT RAISE(ABORT, 'immutable: what a letter says never changes'); END;

CREATE TABLE letter_choice (
  id INTEGER PRIMARY KEY,
  person_id INTEGER NOT NULL REFERENCES person (id),
  kind TEXT NOT NULL,
  ${flag('wanted')},
  ${instant('chosen_at')},
  UNIQUE (person_id, kind)
) STRICT;

CREATE TABLE watch (
  id INTEGER PRIMARY KEY,
  person_id INTEGER NOT NULL REFERENCES person (id),
  scope TEXT NOT NULL CHECK (scope IN ('site', 'line', 'machine', 'axis')),
  scope_id INTEGER NOT NULL,
  ${flag('watched')},
  ${instant('chosen_at')},
  UNIQUE (person_id, scope, scope_id)
) STRICT;
CREATE INDEX watch_place ON watch (scope, scope_id, person_id);
${undeletable('letter', 'letter_choice', 'watch')}`

export const lettersStep = { name: 'letters', sql: letters } as const
