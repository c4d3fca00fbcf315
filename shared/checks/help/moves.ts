import type { HelpTexts } from './types'

/** Examples of the rules about speeds, windows, chains and the calling of moves. */
export const moveHelp: HelpTexts = {
  'speed-limit': {
    given: 'Move 1 with 600 mm/s, unit up to 500 mm/s.',
    reckoned: '600 − 500 = 100; 600 > 500',
    level: 'stop',
    result: 'Move 1: a speed of 600 mm/s is 100 mm/s above the 500 mm/s that the unit can do.',
    remedy: 'Lower the speed to what the unit can do, and look at the cycle time again.',
  },
  'acceleration-limit': {
    given: 'Move 1 with an acceleration of 6000 mm/s² and a deceleration of 2000 mm/s², unit up to 5000 mm/s².',
    reckoned: '6000 − 5000 = 1000; 6000 > 5000',
    level: 'stop',
    result: 'Move 1: an acceleration of 6000 mm/s² is 1000 mm/s² above the 5000 mm/s² that the unit can do.',
    remedy: 'Lower the acceleration to what the unit can do, and look at the cycle time again.',
  },
  'window-grid': {
    given: 'In-position window ±0.015 mm, one count 0.01 mm, repeatability ±0.01 mm.',
    reckoned: '2 · 0.01 = 0.02; 0.015 < 0.02',
    level: 'warn',
    result: 'The in-position window of ±0.015 mm is less than two counts of 0.01 mm, ±0.02 mm.',
    remedy: 'Widen the window to two counts and to what the unit repeats to, or as far as the work allows.',
  },
  'target-grid': {
    given: 'Move 1 to 10.03 mm, one count 0.1 mm, in-position window ±0.05 mm, repeatability ±0.1 mm.',
    reckoned: '10.03 − 100 · 0.1 = 0.03; 0.05 / 2 = 0.025; 0.03 > 0.025',
    level: 'note',
    result: 'Move 1 has its target between counts of 0.1 mm: to 10.03 mm it ends up to 0.03 mm off, more than the 0.025 mm that pass unseen.',
    remedy: 'Choose a target on a whole count where the place matters, above all for steps that repeat.',
  },
  'chain-target': {
    given: 'Move 3 leads on to move 9, which the table does not have.',
    reckoned: 'next = 9: no such row',
    level: 'stop',
    result: 'Move 3 is followed by move 9, which does not exist.',
    remedy: 'Name a move that is there, or take the follower out.',
  },
  'chain-endless': {
    given: 'Move 1 leads on to move 2, move 2 to move 1.',
    reckoned: '1 → 2 → 1',
    level: 'note',
    result: 'Moves 1 and 2 repeat without end.',
    remedy: 'Nothing, if the axis is meant to run until it is stopped; else take one follower out.',
  },
  'select-reach': {
    given: '3 select inputs, moves 1 and 9, the first move number 0.',
    reckoned: 'code = 9 − 0 = 9; 2^3 = 8; 9 >= 8; without line 4: 9 − 8 = 1',
    level: 'warn',
    result: 'Move 9 cannot be called: 3 select inputs reach up to move 7; 9 without its line 4 calls move 1.',
    remedy: 'Wire and set another select input, renumber the move, or call it over the bus.',
  },
  'start-timing': {
    given: 'Settle time 4.5 ms, start pulse 8 ms, input filter 5 ms.',
    reckoned: '5 − 4.5 = 0.5; 4.5 < 5; 8 >= 5',
    level: 'warn',
    result: 'The settle time of the select inputs of 4.5 ms is 0.5 ms shorter than the input filter of 5 ms.',
    remedy: 'Set both times above input filter and controller scan together, here and in the controller.',
  },
  'twin-moves': {
    given: 'Moves 1 and 7, both to 10 mm with 250 mm/s and 2000 mm/s².',
    reckoned: 'all fields equal, number, label and comment aside',
    level: 'note',
    result: 'Moves 1 and 7 do the same.',
    remedy: 'Nothing, if the controller calls both; remember to teach both.',
  },
  'unused-rows': {
    given: 'Row 0 in use, row 4 with speed 0 and acceleration 0.',
    reckoned: 'speed = 0 and acceleration = 0',
    level: 'note',
    result: 'Row 4 is unused: 1 of 2.',
    remedy: 'Nothing: a restored unit is to be as empty there as the old one.',
  },
}
