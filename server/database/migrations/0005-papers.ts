import { flag, immutable, instant, sha256 } from './sql'

const attachments = `
-- Opaque to the vault: what a drive tool saved, a photo. size and sha256 are those of all chunks in order.
CREATE TABLE attachment (
  id INTEGER PRIMARY KEY,
  version_id INTEGER NOT NULL REFERENCES version (id),
  kind TEXT NOT NULL CHECK (kind IN ('drive-backup', 'photo', 'other')),
  name TEXT NOT NULL,
  media_type TEXT NOT NULL,
  note TEXT,
  size INTEGER NOT NULL CHECK (size BETWEEN 1 AND 20971520),
  ${sha256('sha256')},
  ${instant('received_at')},
  person_id INTEGER NOT NULL REFERENCES person (id),
  token_id INTEGER REFERENCES token (id),
  peer TEXT NOT NULL,
  UNIQUE (version_id, sha256)
) STRICT;
${immutable('attachment', ['id'], ['version_id', 'sha256'])}

-- In rows of their own, so that a file goes in and out without ever being whole in memory, and off-site copies hold it.
CREATE TABLE attachment_chunk (
  id INTEGER PRIMARY KEY,
  attachment_id INTEGER NOT NULL REFERENCES attachment (id),
  seq INTEGER NOT NULL CHECK (seq >= 0),
  bytes BLOB NOT NULL,
  UNIQUE (attachment_id, seq)
) STRICT;
${immutable('attachment_chunk', ['id'], ['attachment_id', 'seq'])}`

const labels = `
-- tag: as it was printed; a label with an earlier tag of the axis does not find it any more.
CREATE TABLE label_print (
  id INTEGER PRIMARY KEY,
  axis_id INTEGER NOT NULL REFERENCES axis (id),
  tag TEXT NOT NULL,
  size TEXT NOT NULL CHECK (size IN ('100x50', '50x25')),
  ${instant('at')},
  by_person INTEGER NOT NULL REFERENCES person (id)
) STRICT;
CREATE INDEX label_print_axis ON label_print (axis_id, id);
${immutable('label_print', ['id'])}`

const readiness = `
ALTER TABLE site ADD COLUMN ${flag('attachment_wanted')};
ALTER TABLE site ADD COLUMN label_wanted INTEGER NOT NULL DEFAULT 1 CHECK (label_wanted IN (0, 1));
ALTER TABLE site ADD COLUMN paper TEXT NOT NULL DEFAULT 'A4' CHECK (paper IN ('A4', 'Letter'));
-- Of the drive tools' own backups with the known-good version; the newest printed label's tag.
ALTER TABLE axis_state ADD COLUMN backups INTEGER NOT NULL DEFAULT 0;
ALTER TABLE axis_state ADD COLUMN label_tag TEXT;`

export const papersStep = { name: 'papers', sql: [attachments, labels, readiness].join('\n') } as const
