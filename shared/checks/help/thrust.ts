import type { HelpTexts } from './types'

/** Examples of the rules about thrust, load and stopping. */
export const thrustHelp: HelpTexts = {
  'thrust-limit': {
    given: 'Thrust limit 260 %, rated thrust 640 N, peak thrust 1600 N.',
    reckoned: '100 · 1600 / 640 = 250; 260 − 250 = 10; 260 > 250',
    level: 'stop',
    result: 'The thrust limit of 260 % is 10 points above the 250 % that the unit can do at most.',
    remedy: 'Lower the limit to what the work needs; where it was raised to get through a shift, look for what binds.',
  },
  'overload-plausible': {
    given: 'Overload time 1200 ms, unit up to 1000 ms.',
    reckoned: '1200 − 1000 = 200; 1200 > 1000',
    level: 'stop',
    result: 'The overload time of 1200 ms is 200 ms longer than the 1000 ms that the unit stands.',
    remedy: 'Set the time that the unit stands, and shorten the push if the drive then trips.',
  },
  'thrust-needed': {
    given: 'Payload 9 kg, moving mass 1 kg, level, friction 0 N; move 4 with a deceleration of 6000 mm/s²; thrust limit 10 %, rated thrust 300 N.',
    reckoned: '(9 + 1) · 6000 / 1000 = 60; 10 / 100 · 300 = 30; 60 > 30',
    level: 'stop',
    result: 'Move 4 needs 60 N towards minus to brake, 200 % of the 30 N that its limit leaves.',
    remedy: 'Brake softer, or raise the limit as far as the risk assessment of the machine allows.',
  },
  'thrust-rms': {
    given: 'Payload 149 kg, moving mass 1 kg, level, friction 0 N; moves 1 and 2 go 25 mm there and back without end, up to 250 mm/s with 2500 mm/s²; rated thrust 300 N.',
    reckoned: '(149 + 1) · 2500 / 1000 = 375; 250 / 2500 = 0.1; √((375^2 · 0.1 + 375^2 · 0.1) / (2 · 0.1)) = 375; 375 > 300',
    level: 'stop',
    result: 'Moves 1 and 2 without end need 375 N in the mean over 0.4 s, 125 % of the rated 300 N.',
    remedy: 'Speed up and brake softer, or let the axis rest between the moves.',
  },
  'payload': {
    given: 'Payload 18 kg at 30 deg, unit up to 30 kg level and 12 kg upright.',
    reckoned: 's = sin 30° = 0.5; 1 / ((1 − 0.5) / 30 + 0.5 / 12) = 17.1429; 18 > 17.1429',
    level: 'stop',
    result: 'The payload of 18 kg is 0.8571 kg more than the 17.14 kg that the unit may carry at 30 deg.',
    remedy: 'Weigh again what it carries; make it lighter or take a larger unit.',
  },
  'speed-reached': {
    given: 'Move 1 to 0 mm leads on to move 2 to 10 mm with 250 mm/s and 2000 mm/s².',
    reckoned: '√(2 · 10 · 2000 · 2000 / (2000 + 2000)) = 141.42; 141.42 < 250',
    level: 'note',
    result: 'Move 2 reaches 141.4 of the 250 mm/s asked: its way is too short.',
    remedy: 'Nothing; for a shorter cycle raise the acceleration, not the speed.',
  },
  'quick-stop-soft': {
    given: 'Quick stop 1500 mm/s², move 3 brakes with 2000 mm/s².',
    reckoned: '1500 < 2000',
    level: 'warn',
    result: 'The quick stop brakes with 1500 mm/s², softer than move 3 with 2000 mm/s²: give it at least as much.',
    remedy: 'Set the quick stop at least as hard as the hardest move brakes.',
  },
  'stopping-room': {
    given: 'Home offset 2 mm on a hard stop going negative, stroke 200 mm, hard margin 1 mm; move 1 to 0 mm leads on to move 2 to 190 mm with 250 mm/s and 2000 mm/s²; quick stop 500 mm/s².',
    reckoned: 'hard stop: −2 + 200 + 2 · 1 = 200; braking from: 190 − 250^2 / (2 · 2000) = 174.375; 174.375 + 250^2 / (2 · 500) = 236.875; 236.875 > 200',
    level: 'warn',
    result: 'A quick stop in move 2 from 250 mm/s ends at 236.9 mm, 36.88 mm beyond the hard stop at 200 mm.',
    remedy: 'Brake harder on a quick stop, or go slower where the hard stop is near.',
  },
  'following-window': {
    given: 'Following error window ±4 mm, position gain 50 1/s, move 1 with 250 mm/s, in-position window ±0.05 mm.',
    reckoned: '250 / 50 = 5; 4 < 5',
    level: 'warn',
    result: 'The following error window of ±4 mm is not wider than the 5 mm that the axis lags in move 1 at 250 mm/s: the drive stops it.',
    remedy: 'Widen the window beyond the lag; a larger feed-forward makes the lag itself smaller.',
  },
  'homing-plausible': {
    given: 'Homing on a hard stop with 30 % of 300 N, mounting angle 90 deg, payload 9 kg, moving mass 1 kg, friction 0 N.',
    reckoned: '30 / 100 · 300 = 90; (9 + 1) · 9.80665 · sin 90° = 98.0665; 90 < 98.0665',
    level: 'stop',
    result: 'Homing pushes with 30 %, 90 N, and weight and friction take 98.07 N.',
    remedy: 'Give homing a little more than weight and friction take, and no more than the stop bears.',
  },
  'press-arrives': {
    given: 'Press 2 upwards with a force of 30 % of 300 N, mounting angle 90 deg, payload 9 kg, moving mass 1 kg, friction 0 N.',
    reckoned: '30 / 100 · 300 = 90; (9 + 1) · 9.80665 · sin 90° = 98.0665; 90 < 98.0665',
    level: 'stop',
    result: 'Press 2 pushes with 30 %, 90 N, and needs more than 98.07 N to get to the part: it never arrives.',
    remedy: 'Add what the weight takes to the force that the part is to get.',
  },
  'press-hold': {
    given: 'Press 2 with a force of 60 %, no move after it; overload level 50 %, overload time 400 ms.',
    reckoned: '60 >= 50; no end > 400',
    level: 'stop',
    result: 'Press 2 holds with 60 % without end, and from 50 % on the overload trips after 400 ms.',
    remedy: 'Hold with less than the overload level, or let a move follow before its time is over.',
  },
}
