import { readFileSync } from 'node:fs'
import { readSettings } from '../../shared/settings/read'
import type { Move, SettingsFile, Setup } from '../../shared/settings/types'
import { writeCsv } from '../../shared/settings/write-csv'
import { writeJson } from '../../shared/settings/write-json'

const source = new URL('../../fixtures/larkfield/settings/lid-02.z.json', import.meta.url)

/** Reads a settings file or fails with what is wrong in it. */
export function readOrFail(bytes: Uint8Array): SettingsFile {
  const outcome = readSettings(bytes)
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors))
  return outcome.value.file
}

export interface Told { readonly serial?: string, readonly exportedAt?: string, readonly setup?: Partial<Setup> }

/** What the drive of the invented lid press holds: eight moves, 0 to 7, its home found at the hard stop. */
export function lidPress({ serial, exportedAt, setup }: Told = {}): SettingsFile {
  const file = readOrFail(readFileSync(source))
  return {
    ...file, exportedAt: exportedAt ?? file.exportedAt, unit: { ...file.unit, ...(serial === undefined ? {} : { serial }) },
    setup: { ...file.setup, ...setup },
  }
}

/** The table with one row more; rows from its number on go one further, and so do the moves that follow them. */
export function inserted(moves: readonly Move[], row: Move): Move[] {
  const shift = (number: number) => number >= row.move ? number + 1 : number
  const shifted = moves.map(move => ({ ...move, move: shift(move.move), ...(move.next === undefined ? {} : { next: shift(move.next) }) }))
  return [...shifted, row].sort((a, b) => a.move - b.move)
}

/** A file as a browser's file dialog hands it over. */
export interface PickedFile { readonly name: string, readonly mimeType: string, readonly buffer: Buffer }
export const jsonFile = (name: string, file: SettingsFile): PickedFile => ({ name, mimeType: 'application/json', buffer: Buffer.from(writeJson(file)) })
export const csvFile = (name: string, file: SettingsFile): PickedFile => ({ name, mimeType: 'text/csv', buffer: Buffer.from(writeCsv(file)) })
