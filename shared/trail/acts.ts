/*
 * Everything that is ever logged: act -> the kind of subject whose whole new state the entry carries.
 * Stored for good: an act may be added, never renamed or removed, or old entries no longer read.
 */
export const acts = {
  'vault-set-up': 'vault',
  'setting-changed': 'setting',
  'person-registered': 'person',
  'person-changed': 'person',
  'password-set': 'person',
  'token-made': 'token',
  'token-ended': 'token',

  'site-registered': 'site',
  'site-changed': 'site',
  'line-registered': 'line',
  'line-changed': 'line',
  'machine-registered': 'machine',
  'machine-changed': 'machine',
  'axis-registered': 'axis',
  'axis-changed': 'axis',
  'unit-registered': 'unit',
  'unit-changed': 'unit',
  'fitting-opened': 'fitting',
  'fitting-closed': 'fitting',

  'nameplate-added': 'nameplate',
  'rule-made': 'rule',
  'rule-ended': 'rule',
  'waiver-given': 'waiver',
  'waiver-ended': 'waiver',

  'upload-received': 'upload',
  'content-stored': 'content',
  'version-stored': 'version',
  'version-voided': 'version-void',
  'version-judged': 'check-set',
  'sighting-recorded': 'sighting',
  'tray-kept': 'tray',
  'tray-assigned': 'tray-settled',
  'tray-discarded': 'tray-settled',
  'known-good-marked': 'known-good',
  'known-good-none': 'known-good',
  'kit-taken': 'kit',

  'finding-opened': 'finding',
  'finding-version-added': 'finding-version',
  'finding-explained': 'finding-act',
  'finding-closed': 'finding-act',
  'finding-reopened': 'finding-act',
  'planned-change-announced': 'planned-change',
  'planned-change-ended': 'planned-change',

  'letter-chosen': 'letter-choice',
  'watch-set': 'watch',
  'letter-sent-again': 'letter',
  'attachment-stored': 'attachment',
  'label-printed': 'label-print',
  'swap-opened': 'swap',
  'swap-moved': 'swap',
  'swap-step': 'swap-step',
  'read-back-received': 'read-back',
  'firmware-gap-accepted': 'firmware-gap',
  'checkpoint-taken': 'checkpoint',
  'vault-verified': 'verification',
  'report-asked': 'report',
} as const

export type Act = keyof typeof acts

/** Whether a text is an act that this version knows; an unknown one in a stored entry is a fault, not a thing to skip. */
export const isAct = (text: string): text is Act => Object.hasOwn(acts, text)
