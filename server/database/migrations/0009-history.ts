/*
 * What history is asked by. An index of `version` ends in its id by itself, which is the first part of the key of `change`:
 * pages of an axis, a unit or a person are range scans. The terms are the few log entries about people, places, rules,
 * nameplates, settings and marks, apart from the many about uploads.
 */
const kindOf = `json_extract(leaf, '$.subject.kind')`
const terms = `${kindOf} IN ('vault', 'setting', 'person', 'token', 'site', 'line', 'machine', 'axis', 'nameplate', 'rule', 'known-good')`

const history = `
CREATE INDEX version_axis ON version (axis_id);
CREATE INDEX version_unit ON version (unit_id);
CREATE INDEX version_stored_by ON version (stored_by);
CREATE INDEX version_changed_by ON version (changed_by);
CREATE INDEX version_received ON version (received_at);
CREATE INDEX log_terms ON log (${kindOf}, seq) WHERE ${terms};
CREATE INDEX log_terms_subject ON log (${kindOf}, json_extract(leaf, '$.subject.id'), seq) WHERE ${terms};`

export const historyStep = { name: 'history', sql: history } as const
