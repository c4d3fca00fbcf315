import type { HelpTexts } from './types'

/** Examples of the rules about unit, site and sister axes. */
export const unitHelp: HelpTexts = {
  'unit-matches': {
    given: 'The file names HL40-200V, the register has HR16.',
    reckoned: 'HL40-200V ≠ HR16, nor is HL40 = HR16',
    level: 'stop',
    result: 'The file names HL40-200V, the unit is registered as HR16.',
    remedy: 'Read the type plate: correct the register, or find out whose settings these are.',
  },
  'site-rule': {
    given: 'Jog speed 25 mm/s, a rule of the machine allows up to 10 mm/s.',
    reckoned: '25 > 10',
    level: 'stop',
    result: 'Jog speed 25 mm/s is above the 10 mm/s allowed on this machine: people stand beside it.',
    remedy: 'Keep to the rule, or have whoever made it change it.',
  },
  'extra-range': {
    given: 'K-017 is 40, its dictionary entry allows 0 to 31.',
    reckoned: '40 > 31',
    level: 'stop',
    result: 'K-017 40 is above the maximum of 31.',
    remedy: 'Compare with the drive: set a value within its range, or correct the dictionary of the model.',
  },
  'address-twice': {
    given: 'LID-01.Z and LID-02.Z on one bus, both with node address 26.',
    reckoned: '26 = 26',
    level: 'stop',
    result: 'LID-01.Z and LID-02.Z answer to one address on this bus: 26.',
    remedy: 'Give one of them a free address, in the drive and in the controller, while the bus stands still.',
  },
  'sister-outlier': {
    given: 'Thrust limits of 6 sister axes: 55 % on LID-02.Z, 38 % on the others.',
    reckoned: '6 − 1 = 5; 5 >= 4; 1 / 6 <= 1 / 5',
    level: 'warn',
    result: 'LID-02.Z: thrust limit is 55 %, while 5 sister axes have 38 %.',
    remedy: 'Ask who set it and why: put it right, or explain it where the next one looks.',
  },
}
