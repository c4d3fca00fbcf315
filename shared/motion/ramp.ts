/** A stretch of constant acceleration: x = x0 + v0·τ + a·τ²/2 with τ from 0 to t1 − t0; seconds, mm or deg, signed. */
export interface Segment {
  readonly t0: number
  readonly t1: number
  readonly x0: number
  readonly v0: number
  readonly a: number
}

/** What a stretch of road is driven with; all above 0 save `enter` and `leave`, which are 0 or more. */
export interface Drive {
  readonly speed: number
  readonly acceleration: number
  readonly deceleration: number
  /** Speed at the beginning. */
  readonly enter: number
  /** Speed wanted at the end. */
  readonly leave: number
}

export interface Ramp {
  readonly segments: readonly Segment[]
  /** Speed at the end: `leave`, less where there was no room to reach it, more where there was none to brake. */
  readonly leave: number
  readonly peak: number
}

/**
 * Speeds up, keeps the speed and brakes over a signed distance, from place x and time t on. Where the speed is not
 * reached: vp² = (2·d·a·b + b·enter² + a·leave²)/(a + b).
 */
export function ramp(distance: number, drive: Drive, x: number, t: number): Ramp {
  const { acceleration: a, deceleration: b, enter, leave } = drive
  const d = Math.abs(distance)
  // Compared as distances: a root of what just fits may come out a hair below the speed that it should be.
  if ((enter ** 2 - leave ** 2) / (2 * b) > d) return single(distance, enter, Math.sqrt(Math.max(0, enter ** 2 - 2 * b * d)), -b, x, t)
  if ((leave ** 2 - enter ** 2) / (2 * a) > d) return single(distance, enter, Math.sqrt(enter ** 2 + 2 * a * d), a, x, t)
  const reachable = Math.sqrt((2 * d * a * b + b * enter ** 2 + a * leave ** 2) / (a + b))
  const peak = Math.max(enter, leave, Math.min(drive.speed, reachable))
  const up = (peak ** 2 - enter ** 2) / (2 * a)
  const down = (peak ** 2 - leave ** 2) / (2 * b)
  const road = new Road(Math.sign(distance), x, t)
  road.add((peak - enter) / a, enter, a)
  road.add(peak < reachable ? Math.max(0, d - up - down) / peak : 0, peak, 0)
  road.add((peak - leave) / b, peak, -b)
  return { segments: road.segments, leave, peak }
}

/** Not enough room for more than one stretch: only speeding up, or only braking. */
function single(distance: number, enter: number, leave: number, a: number, x: number, t: number): Ramp {
  const road = new Road(Math.sign(distance), x, t)
  road.add((leave - enter) / a, enter, a)
  return { segments: road.segments, leave, peak: Math.max(enter, leave) }
}

/** Stretches strung one after the other from a place and a time on. */
class Road {
  readonly segments: Segment[] = []

  constructor(private readonly sign: number, private place: number, private clock: number) {}

  /** A stretch of so many seconds, speed and acceleration along the road; none where it takes no time. */
  add(time: number, speed: number, acceleration: number): void {
    if (!(time > 0)) return
    const { sign, place, clock } = this
    this.clock = clock + time
    this.segments.push({ t0: clock, t1: this.clock, x0: place, v0: sign * speed, a: sign * acceleration })
    this.place = place + sign * (speed * time + acceleration * time ** 2 / 2)
  }
}
