import { immutable, instant } from './sql'

/*
 * Audit reports: what was asked for, by whom, and the checkpoint that it bears; the paper is made of the vault as it stood then.
 * The log is found from a subject for what a report tells of, so that each line names the entry that proves it.
 */
const kindOf = `json_extract(leaf, '$.subject.kind')`

const reports = `
-- scope NULL: every axis of the sites. sites NULL: of all sites.
CREATE TABLE report (
  id INTEGER PRIMARY KEY,
  scope TEXT CHECK (scope IN ('site', 'line', 'machine', 'axis')),
  scope_id INTEGER,
  sites TEXT,
  ${instant('from_at', 'NULL')},
  ${instant('to_at', 'NULL')},
  paper TEXT NOT NULL CHECK (paper IN ('A4', 'Letter')),
  ${instant('asked_at')},
  asked_by INTEGER NOT NULL REFERENCES person (id),
  size INTEGER NOT NULL CHECK (size >= 0),
  note TEXT NOT NULL,
  CHECK ((scope IS NULL) = (scope_id IS NULL))
) STRICT;
${immutable('report', ['id'])}
CREATE INDEX log_told ON log (${kindOf}, json_extract(leaf, '$.subject.id'), seq)
WHERE ${kindOf} IN ('version', 'version-void', 'finding-act', 'waiver', 'swap-step', 'planned-change');`

/** Each field of a plan may have a range of its own; min and max hold for those that have none. */
const plannedRanges = `ALTER TABLE planned_change ADD COLUMN ranges TEXT;`

export const reportsStep = { name: 'reports', sql: [reports, plannedRanges].join('\n') } as const
