import { describe, expect, it } from 'vitest'
import { acts, isAct } from '../../../../shared/trail/acts'

/*
 * The acts as they were first stored, each with its kind of subject. A log outlives the version that wrote it: what stands
 * here may be added to, but a line that changes or goes makes entries unreadable that are already in somebody's vault.
 */
const firstStored = {
  'vault-set-up': 'vault', 'setting-changed': 'setting', 'person-registered': 'person', 'person-changed': 'person', 'password-set': 'person',
  'token-made': 'token', 'token-ended': 'token', 'site-registered': 'site', 'site-changed': 'site', 'line-registered': 'line', 'line-changed': 'line',
  'machine-registered': 'machine', 'machine-changed': 'machine', 'axis-registered': 'axis', 'axis-changed': 'axis', 'unit-registered': 'unit',
  'unit-changed': 'unit', 'fitting-opened': 'fitting', 'fitting-closed': 'fitting', 'nameplate-added': 'nameplate', 'rule-made': 'rule', 'rule-ended': 'rule',
  'upload-received': 'upload', 'content-stored': 'content', 'version-stored': 'version', 'version-voided': 'version-void', 'sighting-recorded': 'sighting',
  'tray-kept': 'tray', 'tray-assigned': 'tray-settled', 'tray-discarded': 'tray-settled', 'known-good-marked': 'known-good', 'known-good-none': 'known-good',
  'kit-taken': 'kit', 'attachment-stored': 'attachment', 'label-printed': 'label-print',
}

describe('acts', () => {
  it('are still all those that were ever stored, about the same subjects', () => {
    expect(acts).toMatchObject(firstStored)
  })

  it('are told from other words, those of every object too', () => {
    for (const act of Object.keys(acts)) expect(isAct(act)).toBe(true)
    for (const word of ['version-stord', 'Version-Stored', ' version-stored', 'toString', 'constructor', '__proto__', 'hasOwnProperty', '']) expect(isAct(word), word).toBe(false)
  })

  it('are words that a file, an address and a screen can hold', () => {
    for (const [act, kind] of Object.entries(acts)) {
      expect(act).toMatch(/^[a-z]+(-[a-z]+)+$/)
      expect(kind, act).toMatch(/^[a-z]+(-[a-z]+)*$/)
    }
  })
})
