import type { Vault } from '../../server/database/client'
import { smallPlant } from './plant'

const hash = (digit: string) => digit.repeat(64)
const at = '2026-03-03T06:10:00.000Z'

/** One row in every table that must never change, written past the services; answers what to name them by. */
export function oneOfEach(vault: Vault): Record<string, { where: string, column: string }> {
  const { planner, axisId, unitId } = smallPlant(vault)
  const by = planner.id
  vault.sqlite.exec(`
    INSERT INTO nameplate_revision VALUES (1, 'HL40-200V', 1, '{}', '${at}', ${by});
    INSERT INTO rule VALUES (1, 'axis', ${axisId}, 'thrustLimit', NULL, 40, NULL, 'lids crack', '${at}', ${by});
    INSERT INTO rule_end VALUES (1, '${at}', ${by}, 'new lids');
    INSERT INTO waiver VALUES (1, ${axisId}, 'site-rule', '[]', '{}', 'bracket ordered', '${at}', '${at}', ${by});
    INSERT INTO waiver_end VALUES (1, '${at}', ${by}, 'bracket fitted');
    INSERT INTO upload VALUES (1, '${hash('a')}', 3, x'00', 'json', 'lid.json', '${at}', ${by}, NULL, '127.0.0.1');
    INSERT INTO content VALUES (1, '${hash('b')}', 3, x'00');
    INSERT INTO version (id, axis_id, number, unit_id, upload_id, content_id, occasion, captured_at, received_at, stored_by, engine, copy_hash, scribe_code, model, harm, motion, text, file)
      VALUES (1, ${axisId}, 1, ${unitId}, 1, 1, 'routine', '${at}', '${at}', ${by}, 'e', '${hash('c')}', 'AB12', 'HL40-200V', 0, 0, 0, '{}');
    INSERT INTO version_void VALUES (1, '${at}', ${by}, 'wrong axis');
    INSERT INTO sighting VALUES (1, ${axisId}, 1, '${hash('a')}', NULL, '${at}', '${at}', ${by}, NULL, '127.0.0.1');
    INSERT INTO change (version_id, seq, section, field, at, weight) VALUES (1, 0, 'setup', 'thrustLimit', '/setup/thrustLimit', 'harm');
    INSERT INTO check_set VALUES (1, 1, '1', 1, '${at}', '[]', '[]', 0, 0, 0, 0);
    INSERT INTO check_result VALUES (1, 0, 'travel-span', 'stop', '[]', 'm', '{}', NULL);
    INSERT INTO tray (id, upload_id, problem, detail) VALUES (1, 1, 'unreadable', 'd');
    INSERT INTO tray_settled VALUES (1, 'discarded', '${at}', ${by}, 'r', NULL, NULL);
    INSERT INTO known_good VALUES (1, ${axisId}, 1, '${at}', ${by}, 'approved', NULL, NULL);
    INSERT INTO attachment VALUES (1, 1, 'photo', 'plate.jpg', 'image/jpeg', NULL, 1, '${hash('d')}', '${at}', ${by}, NULL, '127.0.0.1');
    INSERT INTO attachment_chunk VALUES (1, 1, 0, x'00');
    INSERT INTO label_print VALUES (1, ${axisId}, 'LID-02.Z', '50x25', '${at}', ${by});
    INSERT INTO finding VALUES (1, NULL, 'stop-check', 'k', 'LID-02.Z', 'harm', '${at}');
    INSERT INTO finding_version VALUES (1, 1, ${axisId}, 1, NULL, 's', '[]', '${at}');
    INSERT INTO planned_change VALUES (1, '[1]', '[]', NULL, NULL, '${at}', '2026-03-04T06:10:00.000Z', 'new lids', 'Marit', '${at}', ${by}, NULL);
    INSERT INTO planned_change_end VALUES (1, '${at}', ${by}, 'old lids after all');
    INSERT INTO finding_act (id, finding_id, kind, at, by_person, text) VALUES (1, 1, 'explained', '${at}', ${by}, 'new lids');
    INSERT INTO swap VALUES (1, 1, ${axisId}, 'unit', 'dead', NULL, 'unit-in', ${unitId}, NULL, 0, NULL, 1, 1, '{}', '${at}', ${by}, '${at}', NULL);
    INSERT INTO swap_step VALUES (1, 1, 1, 'opened', '${at}', ${by}, 'opened', '{}');
    INSERT INTO read_back VALUES (1, 1, 1, 1, 1, '${hash('e')}', NULL, 'serial', 'd', NULL, NULL, NULL, 0, '${at}', ${by});
    INSERT INTO firmware_gap VALUES (1, 'HL40-200V', '2.4', 'jerk', 1, '${at}', ${by}, NULL, 'r');
    INSERT INTO log_node VALUES (8, 0, zeroblob(32));
    INSERT INTO report VALUES (1, 'axis', ${axisId}, NULL, NULL, NULL, 'A4', '${at}', ${by}, 7, 'n');
    INSERT INTO checkpoint VALUES (1, 0, 'note', '${at}');
    INSERT INTO verification VALUES (1, '${at}', '${at}', 'sound', 0, 0, '[]', 0);`)
  return {
    nameplate_revision: { where: 'id = 1', column: 'nameplate' }, rule: { where: 'id = 1', column: 'reason' }, rule_end: { where: 'rule_id = 1', column: 'reason' },
    waiver: { where: 'id = 1', column: 'reason' }, waiver_end: { where: 'waiver_id = 1', column: 'reason' },
    upload: { where: 'id = 1', column: 'name' }, content: { where: 'id = 1', column: 'size' }, version: { where: 'id = 1', column: 'reason' },
    version_void: { where: 'version_id = 1', column: 'reason' }, sighting: { where: 'id = 1', column: 'name' }, change: { where: 'version_id = 1', column: 'after' },
    check_set: { where: 'id = 1', column: 'rule_set' }, check_result: { where: 'check_set_id = 1', column: 'message' }, tray: { where: 'id = 1', column: 'detail' },
    tray_settled: { where: 'tray_id = 1', column: 'reason' }, known_good: { where: 'id = 1', column: 'note' }, log: { where: 'seq = 0', column: 'leaf' },
    attachment: { where: 'id = 1', column: 'name' }, attachment_chunk: { where: 'id = 1', column: 'seq' }, label_print: { where: 'id = 1', column: 'tag' },
    finding: { where: 'id = 1', column: 'title' }, finding_version: { where: 'id = 1', column: 'says' }, finding_act: { where: 'id = 1', column: 'text' },
    planned_change: { where: 'id = 1', column: 'reason' }, planned_change_end: { where: 'planned_change_id = 1', column: 'reason' },
    swap_step: { where: 'id = 1', column: 'text' }, read_back: { where: 'id = 1', column: 'detail' }, firmware_gap: { where: 'id = 1', column: 'reason' },
    log_node: { where: 'level = 8', column: 'place' }, checkpoint: { where: 'id = 1', column: 'note' }, verification: { where: 'id = 1', column: 'faults' }, report: { where: 'id = 1', column: 'size' },
  }
}
