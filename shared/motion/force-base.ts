import type { Nameplate } from '../settings/nameplate'

/** What 100 % means in the settings of a unit, in N or N·m; undefined where the nameplate does not tell. */
export function forceBaseOf(nameplate: Pick<Nameplate, 'forceBase' | 'ratedThrust' | 'peakThrust'> | undefined): number | undefined {
  return nameplate?.forceBase === 'peak-thrust' ? nameplate.peakThrust : nameplate?.ratedThrust
}
