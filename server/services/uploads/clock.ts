/** A drive's clock may run this far ahead of ours before it is doubted. */
const aheadAllowed = 10 * 60_000

export interface Times {
  /** As the file or the sender says. */
  readonly capturedAt: number
  readonly receivedAt: number
  /** What order, late and base go by: captured-at, or received-at where the clock is doubtful. */
  readonly orderAt: number
  readonly clockDoubtful: boolean
}

/** How long before the vault heard of it a unit may have been read out already: an archive is brought in with its own times. */
const archiveReach = 3 * 365 * 24 * 60 * 60_000

/**
 * Where a unit's known life begins: three years before it was registered or first fitted, whichever came first. An archive of
 * that reach keeps its order; what says it is older was more likely read from a drive whose clock had lost its battery.
 */
export function knownLifeFrom(registeredAt: number, fittings: readonly FittingSpan[]): number {
  return Math.min(registeredAt, ...fittings.map(({ from }) => from)) - archiveReach
}

/**
 * Judges the clock of a file, all in epoch milliseconds. `knownSince` = the beginning of the unit's known life. A drive whose
 * battery is empty says 1970; nothing is refused for it.
 */
export function timesOf(capturedAt: number, receivedAt: number, knownSince: number): Times {
  const clockDoubtful = capturedAt > receivedAt + aheadAllowed || capturedAt < knownSince
  return { capturedAt, receivedAt, orderAt: clockDoubtful ? receivedAt : capturedAt, clockDoubtful }
}

export interface FittingSpan { readonly from: number, readonly to: number | null }

/**
 * The fitting that a file belongs to: the one open at its time in order; where none was, and the file is older than all of them,
 * the first. Undefined: the unit sat nowhere then. `fittings` of one unit, oldest first.
 */
export function fittingFor<Fitting extends FittingSpan>(fittings: readonly Fitting[], times: Times): Fitting | undefined {
  const open = fittings.find(({ from, to }) => from <= times.orderAt && (to === null || times.orderAt < to))
  const [first] = fittings
  return open ?? (first && times.capturedAt < first.from ? first : undefined)
}
