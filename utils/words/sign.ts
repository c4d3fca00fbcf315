/** The three things a mark can mean, as the person signs them. */
export const meaningLabels = {
  reviewed: 'reviewed: I have read it through',
  approved: 'approved: it may be restored to this',
  responsibility: 'responsibility: I answer for these values',
} as const

const steps: Readonly<Record<string, string>> = {
  'signature': 'Type the password you sign in with.',
  'signing-password': 'Set a password of your own first, then come back; nothing was signed.',
  'four-eyes': 'Ask another planner to look at these values and mark the version. Nothing was signed.',
  'stop-checks': 'Put the values right at the drive and upload again, correct the nameplate or the rule if they are wrong, or accept the check with a reason. Nothing was signed.',
  'marked': 'Mark another version first, or say that none is known-good.',
}

/** What to do next after a refused signature; undefined where the vault’s own sentence says it all. */
export function nextStep(code: string): string | undefined {
  return steps[code]
}
