/** The tests that a rule is not done without, each by its title in the file where the rule is tested. */
export interface RuleTests {
  /** A case that it lets pass. */
  readonly passes: string
  /** One that it tells. */
  readonly fails: string
  /** The last that passes beside the first that does not. */
  readonly border: string
  /** What it says where a value is not known. */
  readonly without: string
}

/** By rule, in the order of the table; a test holds each title against its file. */
export const ruleTests: Readonly<Record<string, RuleTests>> = {
  'travel-span': {
    passes: 'is silent for 198 − 0 = 198 mm on a stroke of 200 mm',
    fails: 'stops 205 − 0 = 205 mm on 200 mm, 5 mm too many',
    border: 'lets a span of exactly the stroke pass, decimals or not',
    without: 'names what is missing',
  },
  'travel-placed': {
    passes: 'is silent for limits 5 … 200 within 4 … 204',
    fails: 'stops each limit beyond the stroke: 4 − 2 = 2 mm below, 206 − 204 = 2 mm above',
    border: 'lets the ends of the stroke pass, and not a millionth more',
    without: 'names what is missing, and judges the limit that is there',
  },
  'soft-limits-off': {
    passes: 'is silent while they are on',
    fails: 'stops on a gravity or press axis',
    border: 'only warns where the axis can merely hit something: the border between the two levels',
    without: 'has nothing to say where the field is not written: then limits count as on, and unknown ones are told by travel-span',
  },
  'target-inside': {
    passes: 'is silent for places between the limits and on them',
    fails: 'says by how much a move ends beyond: 212.4 − 198 = 14.4 mm',
    border: 'counts the millionth of a millimetre next to the limit',
    without: 'judges by the one limit that is given and names the other',
  },
  'relative-step': {
    passes: 'notes how often a step fits: 198 / 20 = 9.9, so 9 times',
    fails: 'stops a step that fits not even once: 198.000001 on 198 mm',
    border: 'warns of a step that fits once: 198 / 99.000001 is just below 2, 198 / 99 is 2',
    without: 'names missing limits',
  },
  'press-path': {
    passes: 'is silent for 50 → 100 → 150 and for 190 → 150 → 100: either way round is right',
    fails: 'stops a start beyond the approach: 120 − 100 = 20 mm',
    border: 'lets a press start on its approach, and not a millionth beyond',
    without: 'lists the absolute moves that end between approach and target where the start is not known',
  },
  'press-force': {
    passes: 'is silent within the range of the unit, its ends included',
    fails: 'stops what is above or below: 120 − 70 = 50 points, 20 − 12.5 = 7.5 points',
    border: 'lets each end of the range and the thrust limit itself pass, and not a millionth beyond',
    without: 'names what is missing, once for all presses',
  },
  'press-arrives': {
    passes: 'is silent for a press that lifts its load: 30 % = 90 N of 59.03325 N',
    fails: 'stops one that is weaker: 15 % = 45 N of 59.03325 N',
    border: 'never arrives with just what weight and friction take: on the level 10 N of friction, 10 N of thrust',
    without: 'names what is missing, and leaves a press without a way to another rule',
  },
  'press-hold': {
    passes: 'is silent for a hold within the rated thrust, 100 % included',
    fails: 'warns of more than that without end, and not where a move follows',
    border: 'stops a hold without end from the overload level on',
    without: 'asks for the one of level and time that decides, and for neither where both are absent',
  },
  'press-speed': {
    passes: 'is silent up to the speed that the unit may press with',
    fails: 'stops above it: 25 − 20 = 5 mm/s',
    border: 'lets exactly the permitted energy pass: 8 kg at 500 mm/s are ½·8·0.25 = 1 J',
    without: 'names the speed that the nameplate lacks',
  },
  'thrust-limit': {
    passes: 'is silent up to what the unit stands without end, that included',
    fails: 'stops above the peak of the unit: 100·600/300 = 200 %, 250 is 50 points more',
    border: 'lets the peak itself pass as what it is: more than the rated thrust',
    without: 'does without the peak, and names the rated thrust where the peak says nothing without it',
  },
  'overload-plausible': {
    passes: 'is silent for a level that the thrust can pass, within the time of the unit',
    fails: 'notes a level above every thrust limit: of 90 both ways and 80 one way the highest is 90 %',
    border: 'lets the time of the unit itself pass, and stops a millisecond more',
    without: 'names the time that the nameplate lacks',
  },
  'speed-limit': {
    passes: 'is silent up to the speed of the unit, that speed included',
    fails: 'stops above it: 900 − 800 = 100 mm/s',
    border: 'lets the speed of the unit and that of the setup pass, and not a millionth more',
    without: 'names the missing nameplate and still holds moves against the setup',
  },
  'acceleration-limit': {
    passes: 'is silent up to the acceleration of the unit, that value included',
    fails: 'stops above it, once where braking is as accelerating: 5500 − 5000 = 500 mm/s²',
    border: 'lets the acceleration of the unit and those of the setup pass, and not a millionth more',
    without: 'speaks degrees on a rotary axis and names what is missing',
  },
  'quick-stop-soft': {
    passes: 'is silent where the quick stop is harder, or as hard, as every move',
    fails: 'warns of the hardest move: 1000 against 3000 mm/s²',
    border: 'lets a quick stop just as hard pass, and not a millionth softer',
    without: 'names the quick stop where it is not given',
  },
  'speed-reached': {
    passes: 'is silent where the way is long enough, to the last bit: 2·250²/(2·2000) = 31.25 mm',
    fails: 'notes what a short way gives: 5 mm at 3000 mm/s² reach √(3000·5) = 122.474487 mm/s',
    border: 'turns at the way that just reaches it: 31.25 mm do, 31.24 mm reach √(2000·31.24) = 249.96 mm/s',
    without: 'says nothing where nobody knows how long the way is, and of a move that goes nowhere',
  },
  'thrust-needed': {
    passes: 'is silent up to 80 % of the limit, that included: 10 kg at 2400 mm/s² are 24 N of 10 % = 30 N',
    fails: 'stops above the limit, and leads with braking before speeding up',
    border: 'warns above 80 % and still at the limit itself: 25 N are 83.33 %, 30 N are 100 %',
    without: 'names what is missing',
  },
  'thrust-rms': {
    passes: 'is silent up to 85 % of the rated thrust: 13.801311 N are 84.996 % of 16.2375 N',
    fails: 'warns above 85 % and stops above the rated thrust of an endless chain',
    border: 'lets the rated thrust itself pass as a warning: a load that stands upright needs 98.0665 N all the time',
    without: 'names what is missing, moves of a duty too',
  },
  'payload': {
    passes: 'lets the level and the upright maximum pass, each at its angle',
    fails: 'stops more than that: 13 − 12 = 1 kg',
    border: 'turns at the maximum: 12 kg pass upright, 12.000001 kg do not; 30 and 30.000001 kg on the level',
    without: 'passes within the smaller maximum where the angle is not known, and asks for the angle above it',
  },
  'stopping-room': {
    passes: 'is silent for a quick stop as hard as the braking: it ends at the target at the latest',
    fails: 'warns of one that ends beyond the hard stop: 190 − 15.625 + 250²/(2·1000) = 205.625, 5.125 mm beyond 200.5',
    border: 'lets a stop at the hard stop itself pass: 184.875 − 15.625 + 31.25 = 200.5',
    without: 'still warns by the deceleration asked where the load is not known, and names what is missing',
  },
  'following-window': {
    passes: 'is silent where it is wider than band and lag: 250/100 = 2.5 mm',
    fails: 'warns up to the lag, that included: 250/50 = 5 mm',
    border: 'warns up to the in-position window, that included',
    without: 'names what is missing',
  },
  'window-grid': {
    passes: 'is silent for ±0.05 mm on counts of 0.01 mm, repeating to ±0.02 mm',
    fails: 'warns below two counts: ±0.015 mm < 2 · 0.01 mm',
    border: 'lets exactly two counts and exactly the repeatability pass',
    without: 'names what is missing, and judges by the other',
  },
  'target-grid': {
    passes: 'is silent for 10.3 mm on counts of 0.1 mm, whatever binary noise a division leaves',
    fails: 'notes 10.03 mm, 0.03 mm off 10.0 where half the window is 0.025 mm',
    border: 'lets just half the window pass: 10.025 mm is 0.025 mm off',
    without: 'names what is missing',
  },
  'chain-target': {
    passes: 'is silent where every follower is there, the row itself included',
    fails: 'stops a follower that does not exist or is an unused row',
    border: 'goes by numbers, not by places in the table: row 3 stands second',
    without: 'does not apply where no used row has a follower',
  },
  'chain-endless': {
    passes: 'is silent for a chain that ends',
    fails: 'warns where a lap takes no time: nothing travels and nothing waits',
    border: 'only notes it where a lap takes a millisecond or a millionth of a millimetre',
    without: 'does not apply without followers',
  },
  'chain-after-press': {
    passes: 'does not apply to presses that nothing follows, nor to chains without a press',
    fails: 'notes that a follower starts where the press ended',
    border: 'tells a press that follows itself, and each of several: the border of what follows',
    without: 'names the furthest place where the approach is not known',
  },
  'select-reach': {
    passes: 'is silent up to the highest code: 5 inputs reach 31, 3 inputs 7',
    fails: 'says what the line that is not wired would call instead: 8 is 1000, 20 is 10100; with three inputs 000 and 100',
    border: 'agrees with counting all codes, for 1 to 10 inputs',
    without: 'takes 0 as first move and all off as the first without a nameplate',
  },
  'start-timing': {
    passes: 'is silent for 6 and 8 ms behind a filter of 2 ms',
    fails: 'warns below the input filter: 5 − 4.5 = 0.5 ms too short',
    border: 'warns below 4 ms, and lets 4 ms and the filter itself pass',
    without: 'names what is missing, and still judges by practice',
  },
  'zone-reach': {
    passes: 'is silent for zones that lie apart, within 0 … 198 mm',
    fails: 'warns of a zone wholly outside: 200 > 198',
    border: 'notes a zone partly outside, down to one that only touches the limit',
    without: 'names missing limits, and judges by the one that is there',
  },
  'homing-plausible': {
    passes: 'is silent for a homing that lifts its load: 40 % = 120 N',
    fails: 'stops one that is weaker than weight and friction, either way it goes: 30 % = 90 N of 105.0665 N',
    border: 'lets just as much pass: friction of 21.9335 N make it 120 N',
    without: 'names the method and the load where they are not given',
  },
  'home-side': {
    passes: 'is silent for home at −2 below 0, and at 200 above 198',
    fails: 'stops home at 5, 5 − 0 = 5 mm inside the lower limit',
    border: 'lets home on the limit pass, and not a millionth inside',
    without: 'names what is missing: of the limits only the one on the side of homing',
  },
  'brake-vertical': {
    passes: 'is silent for a brake of 300 N that closes in 40 ms and is given 60 ms',
    fails: 'stops a drive that lets go without a brake',
    border: 'is silent where friction holds the load: 98.0665 N is not above 98.0665 N',
    without: 'names what is missing',
  },
  'brake-agrees': {
    passes: 'is silent where drive and unit say the same',
    fails: 'stops where they do not',
    border: 'takes false for an answer and only what is not given for none: the border of what is known',
    without: 'names what is missing',
  },
  'polarity-flip': {
    passes: 'is silent where all places are mirrored about the zero: 50 + (−50) = 0, 10 + (−10) = 0',
    fails: 'stops targets that stayed as they were',
    border: 'stops for one row among mirrored ones, off by a millionth',
    without: 'names the direction that is missing on one side, and does not apply where both or the version before are',
  },
  'twin-moves': {
    passes: 'is silent where every row does something else',
    fails: 'folds all twins into one line, number, label and comment aside',
    border: 'takes a default that is written out for the same: the border of sameness',
    without: 'skips unused rows, and does not apply to a single move',
  },
  'unused-rows': {
    passes: 'is silent where every row is in use',
    fails: 'folds all of them into one line',
    border: 'counts a row only where speed and acceleration are both 0: one of the two is no empty row',
    without: 'does not apply to an empty table',
  },
  'unit-matches': {
    passes: 'is silent for the registered type code',
    fails: 'warns where only the stem is the same, stops where not even that is',
    border: 'compares type codes to the last sign: another case or a suffix is another build, another stem another unit',
    without: 'does not know without a registered unit',
  },
  'force-rescale': {
    passes: 'is silent where 100 % means the same on both units',
    fails: 'stops 38 % of 640 N = 243.2 N that would be 38 % of 800 N = 304 N',
    border: 'takes the smallest difference for one: bases are compared as they stand',
    without: 'names the base that is missing on either side',
  },
  'site-rule': {
    passes: 'lets the bounds themselves pass',
    fails: 'says the reason: 55 % against at most 45 %',
    border: 'turns at its bounds: 55 % pass at most 55 and at least 55, and not a millionth beyond',
    without: 'does not know where the value is not set or the field means nothing',
  },
  'extra-range': {
    passes: 'is silent inside the range, its ends included',
    fails: 'stops outside, with the name and the unit of the dictionary',
    border: 'turns at the ends of the range: 0 and 15 pass, a millionth beyond does not',
    without: 'does not know without a nameplate',
  },
  'sister-outlier': {
    passes: 'is silent where all agree',
    fails: 'warns of the one of six that is not as five others are',
    border: 'takes four that agree and one in five that does not for enough, and no less',
    without: 'has nothing to go by among no or few sisters: the unknown case of a live rule',
  },
  'address-twice': {
    passes: 'is silent where every drive has its own',
    fails: 'stops two drives with one address, and names all that share it',
    border: 'takes 0 for no address, and 1 for one: the border',
    without: 'names the axes whose address is missing, as long as there is anybody to share with',
  },
}
