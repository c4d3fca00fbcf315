/*
 * Relations of a lead screw: one turn moves the nut by the lead. Torques in N·m, thrusts in N, lead in mm a turn; the
 * efficiency η lies above 0 and at most at 1. The work of one turn is the same on both sides: 2π·T·η = F·lead.
 */

/** Turns a minute for a speed in mm/s: 60·v/lead. */
export function screwTurns(speed: number, lead: number): number {
  return 60 * speed / lead
}

/** Torque that drives a thrust: F·lead/(2000·π·η). */
export function drivingTorque(thrust: number, lead: number, efficiency = 1): number {
  return thrust * lead / (2000 * Math.PI * efficiency)
}

/** Torque that holds a thrust which drives the screw back: F·lead·η/(2000·π); friction helps to hold. */
export function backDrivingTorque(thrust: number, lead: number, efficiency = 1): number {
  return thrust * lead * efficiency / (2000 * Math.PI)
}

/** Torque of a standing screw, friction counted as none: F·lead/(2000·π). */
export function standingTorque(thrust: number, lead: number): number {
  return thrust * lead / (2000 * Math.PI)
}

/** Thrust that a driving torque gives, the inverse of `drivingTorque`: 2000·π·η·T/lead. */
export function thrustOfTorque(torque: number, lead: number, efficiency = 1): number {
  return torque * 2000 * Math.PI * efficiency / lead
}
