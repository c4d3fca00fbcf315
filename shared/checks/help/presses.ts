import type { HelpTexts } from './types'

/** Examples of the rules about presses, forces and brakes. */
export const pressHelp: HelpTexts = {
  'press-path': {
    given: 'Move 1 to 120 mm leads on to press 2 with approach 100 mm and target 150 mm, soft limits 0 mm and 198 mm.',
    reckoned: '120 − 100 = 20; 20 > 0',
    level: 'stop',
    result: 'Press 2 starts at 120 mm, 20 mm beyond its approach of 100 mm.',
    remedy: 'Let the move before it end short of the approach, or put the approach further back.',
  },
  'press-force': {
    given: 'Press 2 with a force of 75 %, press forces of the unit 20 % to 70 %.',
    reckoned: '75 − 70 = 5; 75 > 70',
    level: 'stop',
    result: 'Press 2 pushes with 75 %, 5 points above the 70 % that the unit may press with.',
    remedy: 'Set the force within the range of the unit, or take a stronger unit.',
  },
  'press-speed': {
    given: 'Press 2 with a press speed of 25 mm/s, unit up to 20 mm/s.',
    reckoned: '25 − 20 = 5; 25 > 20',
    level: 'stop',
    result: 'Press 2 presses at 25 mm/s, 5 mm/s above the 20 mm/s that the unit may press with.',
    remedy: 'Lower the press speed; win the time back before the approach.',
  },
  'chain-after-press': {
    given: 'Press 2 with approach 100 mm and target 150 mm leads on to move 3.',
    reckoned: 'start of move 3: 100 to 150, wherever press 2 ends',
    level: 'note',
    result: 'Move 3 starts when press 2 ends, between 100 mm and 150 mm.',
    remedy: 'Nothing, where the follower may start from anywhere in between; else let the controller call it.',
  },
  'force-rescale': {
    given: 'Thrust limit 38 % brought from a unit with 640 N to one with a rated thrust of 800 N.',
    reckoned: '38 / 100 · 640 = 243.2; 38 / 100 · 800 = 304; 640 / 800 = 0.8',
    level: 'stop',
    result: '100 % meant 640 N on the unit that the values come from and means 800 N on this one: thrust limit 38 % was 243.2 N and would be 304 N.',
    remedy: 'Multiply every percentage by the factor, write the new values into the drive and confirm the rescaling.',
  },
  'brake-vertical': {
    given: 'Mounting angle 90 deg, payload 8 kg, moving mass 2 kg, friction 20 N; brake fitted, engages after 30 ms, closes in 40 ms, holds 300 N.',
    reckoned: '(8 + 2) · 9.80665 · sin 90° = 98.0665; 98.0665 > 20; 30 < 40',
    level: 'stop',
    result: 'Gravity drives the axis back with 98.07 N, and the drive lets go 30 ms after it calls the brake, which takes 40 ms to close.',
    remedy: 'Let the drive hold on for longer than the brake takes to close; block the axis before working under it.',
  },
  'brake-agrees': {
    given: 'Drive set to a fitted brake, nameplate without one.',
    reckoned: 'brakeFitted: true here, false on the nameplate',
    level: 'stop',
    result: 'The drive is set to handle a brake, the unit has none.',
    remedy: 'Look at the unit: correct the setting if it is wrong, the nameplate if that is.',
  },
}
