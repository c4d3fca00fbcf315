import type { Move } from '../../shared/settings/types'
import { sampleSetup } from '../sample-file'

/*
 * The settings of one group of axes through time: each step changes about five values. One step in twenty changes what is
 * watched, as somebody at the machine does; the others change what a script finds every night: keys of the drive's own, labels,
 * comments, friction.
 */

/** The part of a settings file behind unit and time, as it would be exported. */
export interface Settings {
  readonly setup: Record<string, unknown>
  readonly moves: Move[]
  readonly extra: Record<string, number>
}

const moveCount = 16
const keyCount = 24
export const keyName = (index: number): string => `K-${String(index).padStart(3, '0')}`

/** Mulberry32, public domain: the same seed gives the same plant. */
function randomOf(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), state | 1)
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)) ^ mixed
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296
  }
}

export class Chain {
  readonly settings: Settings
  private readonly random: () => number
  private step = 0

  constructor(seed: number) {
    this.random = randomOf(seed * 7919 + 1)
    this.settings = {
      setup: { ...sampleSetup, softLimitMin: 0, softLimitMax: 195, followingErrorWindow: 8, overloadLevel: 50, brakeReleaseDelay: 60, brakeEngageDelay: 60, thrustLimit: 60 + seed % 20, frictionForce: 11 + seed % 7, positionGain: 30 + seed % 25 },
      moves: Array.from({ length: moveCount }, (_, move): Move => ({
        move, label: `Station ${move}`, kind: 'absolute', target: 10 + (move * 37 + seed) % 180, speed: 100 + (move * 17 + seed) % 300, acceleration: 2000, deceleration: 2500, window: 0.1, comment: 'belt running',
      })),
      extra: Object.fromEntries(Array.from({ length: keyCount }, (_, index) => [keyName(index), seed + index])),
    }
  }

  /** Changes about five values; whether one of them is watched. */
  next(): { watched: boolean } {
    this.step += 1
    const watched = this.random() < 0.05
    if (watched) this.changeWatched()
    if (this.random() < 0.1) this.addTo('smoothingTime', 1, 40)
    if (this.random() < 0.1) this.addTo('frictionForce', 1, 30)
    const keys = Math.floor(this.random() * 6)
    const first = this.below(keyCount)
    for (let index = 0; index < keys; index += 1) this.addToKey((first + index * 5) % keyCount)
    for (let texts = this.random() < 0.5 ? 1 : 3; texts >= 0; texts -= 1) this.relabel(this.below(moveCount))
    return { watched }
  }

  private below(most: number): number {
    return Math.floor(this.random() * most)
  }

  private addTo(field: string, by: number, most: number): void {
    const value = Number(this.settings.setup[field]) + by
    this.settings.setup[field] = value > most ? value - most / 2 : value
  }

  private addToKey(index: number): void {
    const { extra } = this.settings
    extra[keyName(index)] = (extra[keyName(index)] ?? 0) + 1
  }

  private relabel(index: number): void {
    const move = this.settings.moves[index]
    if (move) this.settings.moves[index] = { ...move, label: `Station ${index}, ${this.step}` }
  }

  private changeWatched(): void {
    const at = this.below(moveCount)
    const move = this.settings.moves[at]
    const which = this.below(3)
    if (which === 0) this.addTo('thrustLimit', 1, 80)
    else if (move && which === 1) this.settings.moves[at] = { ...move, speed: move.speed >= 400 ? 150 : move.speed + 5 }
    else if (move) this.settings.moves[at] = { ...move, target: move.target >= 190 ? 20 : move.target + 0.5 }
  }
}

/** The file as a drive would give it out. */
export function fileText({ setup, moves, extra }: Settings): string {
  return `"axisKind":"linear","setup":${JSON.stringify(setup)},"zones":[{"zone":1,"from":10,"to":25}],"moves":${JSON.stringify(moves)},"extra":${JSON.stringify(extra)}}`
}

export function fileHead(serial: string, exportedAt: string, operatingHours: number): string {
  return `{"schema":"witnessmark.axis-settings/1","unit":{"serial":"${serial}","model":"HL40-200V","firmware":"2.4"},"exportedAt":"${exportedAt}","readings":{"operatingHours":${operatingHours}},`
}
