/**
 * What the turning parts of a screw axis weigh along the stroke: J·(2π/lead)², in kg from kg·cm² and mm a turn.
 * The kinetic energy of the turning parts is the same as that of this mass at the axis' speed.
 */
export function reflectedMass(rotorInertia: number, lead: number): number {
  const radiansPerMetre = 2 * Math.PI / (lead / 1000)
  return rotorInertia * 1e-4 * radiansPerMetre ** 2
}
