/** Standard gravity in m/s², exact (NIST SP 811, B.8). */
export const standardGravity = 9.80665

/** What a linear press meets on its way: kg, deg of the positive direction against level, N. */
export interface PressLoad { readonly mass: number, readonly mountingAngle: number, readonly friction: number }

/**
 * Force in N that reaches the part: the limited thrust, less the weight it lifts (or plus the weight that helps) and less
 * friction. `push` is 1 towards plus and -1 towards minus; negative = the press never gets to the part.
 */
export function forceOnPart(thrust: number, push: 1 | -1, load: PressLoad): number {
  const weight = load.mass * standardGravity * Math.sin(load.mountingAngle * Math.PI / 180)
  return thrust - push * weight - load.friction
}
