import { swapSteps, type SwapState, type SwapStep } from './types'

/** What has been done since the unit now in was taken up; a unit put back begins anew. */
export interface Progress {
  /** A unit is in that fits, or that a planner allowed. */
  readonly fitted: boolean
  readonly safe: boolean
  /** Read back and compared at least once. */
  readonly readBack: boolean
  readonly firstMotion: boolean
  readonly running: boolean
  readonly ended: 'released' | 'abandoned' | null
}

const doneBy: Readonly<Record<SwapStep, (progress: Progress) => boolean>> = {
  'unit-in': ({ fitted }) => fitted,
  'safe': ({ safe }) => safe,
  'read-back': ({ readBack }) => readBack,
  'first-motion': ({ firstMotion }) => firstMotion,
  'running': ({ running }) => running,
  'release': ({ ended }) => ended === 'released',
}

/** The first step that is not done, or how the swap ended. */
export function stepOf(progress: Progress): SwapState {
  return progress.ended ?? swapSteps.find(step => !doneBy[step](progress)) ?? 'released'
}

/** The steps that come before `step` and are not done, in order; none: it may be taken. */
export function missingFor(step: SwapStep, progress: Progress): SwapStep[] {
  return swapSteps.slice(0, swapSteps.indexOf(step)).filter(earlier => !doneBy[earlier](progress))
}
