/** ½ m v² in joules, from kg and mm/s. */
export function linearImpact(mass: number, speed: number): number {
  return 0.5 * mass * (speed / 1000) ** 2
}

/** ½ J ω² in joules, from kg·cm² at the output and deg/s. */
export function rotaryImpact(inertia: number, speed: number): number {
  return 0.5 * inertia * 1e-4 * (speed * Math.PI / 180) ** 2
}
