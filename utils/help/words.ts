/** A word of the trade, or of this application, and what is meant by it. */
export interface Word { readonly word: string, readonly means: string }

/** In the order of the alphabet. */
export const tradeWords: readonly Word[] = [
  { word: 'Approach', means: 'the place on the way of a press from which on it goes slowly, with limited force' },
  { word: 'Axis', means: 'a place in a machine where a drive moves something; it keeps its tag when the unit in it is changed' },
  { word: 'Carry', means: 'what becomes of a value on another unit: copy, prove (copied, then proved at the machine), teach (found anew there), place (belongs to the axis’ place)' },
  { word: 'Chain', means: 'moves that start each other: a row names the one that follows it' },
  { word: 'Duty', means: 'the moves of one cycle in their order, and how long the cycle takes; the load of the motor over time is reckoned from it' },
  { word: 'Finding', means: 'something that a person must explain, such as a watched value that changed; somebody else closes it' },
  { word: 'Fitting', means: 'which unit sat on which axis, from when until when' },
  { word: 'Flag', means: 'what an axis can do to people and machine: gravity (it can fall), press (it pushes), collision (its moves can hit something)' },
  { word: 'Force base', means: 'what 100 % of thrust or torque means on a model: its rated thrust or its peak thrust' },
  { word: 'Known-good', means: 'the version that somebody signed for: what a replacement unit gets' },
  { word: 'Nameplate', means: 'what units of one model can do; a change adds a revision and leaves the old one' },
  { word: 'Planned change', means: 'a change announced before it is made: what fits its axis, field, range and window is explained when it is seen' },
  { word: 'Reflected mass', means: 'what motor, coupling and screw weigh along the stroke because they have to be turned' },
  { word: 'Revision', means: 'one state of a nameplate; checks say which one they went by' },
  { word: 'RMS thrust', means: 'the constant thrust that heats a motor as much as the changing one does' },
  { word: 'Scribe code', means: 'ten characters reckoned from what a unit holds: two equal codes, one content' },
  { word: 'Sighting', means: 'an upload that found the same as the one before: proof that nothing changed' },
  { word: 'Sister axes', means: 'axes of one role and one model in a site; set alike unless there is a reason' },
  { word: 'Site rule', means: 'a narrower range of a field for a site, a machine or an axis, with its reason' },
  { word: 'Soft limits', means: 'the places beyond which the drive refuses to go; the hard stops lie outside of them' },
  { word: 'Tray', means: 'where files wait that have no axis yet or could not be read; nothing is thrown away' },
  { word: 'Unit', means: 'the drive or cylinder itself, by its serial; it can move from axis to axis' },
  { word: 'Version', means: 'one state of what a unit held, kept whole and never altered' },
  { word: 'Watched field', means: 'one whose every change is a finding: what can hurt, and what the site added' },
  { word: 'Weight', means: 'what a change can do: harm (hurt or break), motion (change the work), text (neither)' },
]

/** What each level of a check asks for. */
export const levelWords = {
  stop: 'Can hurt, break, or cannot work. A version with one is not marked known-good without a written waiver.',
  warn: 'Probably wrong, or near a limit. Look at it before the next shift.',
  note: 'Worth knowing. Folded away, one line a rule.',
  unknown: 'Could not be judged; the line names the value that is missing. On an axis flagged gravity or press, an unknown of a rule that can stop keeps a version from being marked.',
} as const
