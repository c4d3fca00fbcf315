/*
 * What stands wherever values leave for a drive. Named with it: ISO 12100, ISO 14118, IEC 60204-1, IEC 61800-5-1,
 * 29 CFR 1910.147.
 */
export const cautions: readonly string[] = [
  'Isolate and lock out before a hand goes in. Wait until stored energy is gone: DC link, springs, air, weight.',
  'Block what can fall: prop, pin or lower it. Safe torque off does not hold a load.',
  'Check the polarity of inputs and outputs before power.',
  'First motion at reduced speed, with nobody in reach.',
  'Values to be taught are not copied. Teach them on the new unit.',
  'Thrust and speed limits belong to the machine’s risk assessment.',
  'The machine maker’s instructions, local codes and a qualified person decide. This tool does not, and it is no safety function.',
]

export const cautionSources = 'ISO 12100, ISO 14118, IEC 60204-1, IEC 61800-5-1, 29 CFR 1910.147'
