import type { TrailState, Verification } from '#shared/api/trail'

const words = { sound: 'Sound.', failed: 'Could not be ended.' } as const

/** How a verification ended, with its count where it found something. */
export const outcomeWord = ({ outcome, faults }: Verification): string => outcome === 'damage' ? `Damage: ${faults} ${faults === 1 ? 'fault' : 'faults'}.` : words[outcome]

/** The answer that the trail page heads with. */
export function trailTitle({ size, verifications: [newest] }: TrailState): string {
  const entries = `${size} ${size === 1 ? 'entry' : 'entries'}`
  if (!newest) return `${entries}, not verified yet`
  return newest.outcome === 'sound' ? `${entries}, found sound` : newest.outcome === 'damage' ? `${entries}, ${newest.faults} ${newest.faults === 1 ? 'fault' : 'faults'} found` : `${entries}, the last verification could not be ended`
}
