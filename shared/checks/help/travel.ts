import type { HelpTexts } from './types'

/** Examples of the rules about travel, ends and homing. */
export const travelHelp: HelpTexts = {
  'travel-span': {
    given: 'Soft limits 0 mm and 205 mm, stroke 200 mm.',
    reckoned: '205 − 0 = 205; 205 > 200',
    level: 'stop',
    result: 'The soft limits span 205 mm, 5 mm more than the stroke of 200 mm.',
    remedy: 'Compare the limits with the drive and the stroke with the type plate, and set the limits within the stroke.',
  },
  'travel-placed': {
    given: 'Homing on a hard stop going negative, home offset −3 mm, stroke 200 mm, hard margin 1 mm, soft limits 2 mm and 200 mm.',
    reckoned: 'h = −(−3) = 3; hard stops 3 and 3 + 200 + 2 · 1 = 205; drawn in by 1: 3 + 1 = 4 and 205 − 1 = 204; 2 < 4',
    level: 'stop',
    result: 'The lower soft limit of 2 mm lies 2 mm beyond the end of the stroke at 4 mm; the hard stop stands at 3 mm.',
    remedy: 'Correct the home offset if the zero is wrong, else draw the soft limit in; try it at jog speed.',
  },
  'soft-limits-off': {
    given: 'Soft limits switched off on an axis flagged gravity.',
    reckoned: 'softLimitsActive = false; gravity: stop, without gravity or press: warn',
    level: 'stop',
    result: 'The soft limits are off on a gravity axis: the drive lets every move run on to the hard stop.',
    remedy: 'Switch the soft limits on again, or write down in a waiver why the axis runs without them.',
  },
  'target-inside': {
    given: 'Soft limits 0 mm and 198 mm, move 5 to 212.4 mm.',
    reckoned: '212.4 − 198 = 14.4; 212.4 > 198',
    level: 'stop',
    result: 'Move 5 ends at 212.4 mm, 14.4 mm beyond the soft limit of 198 mm.',
    remedy: 'Teach the target anew; widen the limit only if the machine has the room.',
  },
  'relative-step': {
    given: 'Soft limits 0 mm and 198 mm, move 3 a step of 150 mm.',
    reckoned: 'n = floor((198 − 0) / 150) = 1',
    level: 'warn',
    result: 'Move 3, a step of 150 mm, fits only once into the 198 mm between the soft limits.',
    remedy: 'See that the controller sends the axis back before it calls the step again, or use a move to a place.',
  },
  'zone-reach': {
    given: 'Soft limits 0 mm and 198 mm, zone 2 from 200 mm to 210 mm.',
    reckoned: '200 > 198',
    level: 'warn',
    result: 'Zone 2 from 200 mm to 210 mm lies wholly outside the soft limits from 0 mm to 198 mm.',
    remedy: 'Put the zone where the signal is wanted, or take it out if nothing listens to it.',
  },
  'home-side': {
    given: 'Homing on a hard stop going negative, home offset −5 mm, lower soft limit 0 mm.',
    reckoned: 'h = −(−5) = 5; 5 > 0',
    level: 'stop',
    result: 'Home, found going negative, reads 5 mm: 5 mm inside the lower soft limit of 0 mm, where it has to lie on or beyond it.',
    remedy: 'Check the sign of the home offset and the direction of homing at the machine before anything moves.',
  },
  'polarity-flip': {
    given: 'The version before: positive direction extend, move 1 to 50 mm. This version: retract, move 1 to 50 mm.',
    reckoned: 'mirrored: 50 + (−50) = 0; as it stands: 50 + 50 = 100; 100 > 0',
    level: 'stop',
    result: 'The positive direction turns from extend to retract and move 1 is not mirrored: the axis would run the other way.',
    remedy: 'Turn the direction back, or mirror targets, approaches and limits and try them at jog speed.',
  },
}
