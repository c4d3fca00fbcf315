import type { AxisKind, Content, Move, SettingsFile, Zone } from './types'

/** Content with every key and no value: the scribe code of a linear one is RKK20-GSKBY. */
export function emptyContent(axisKind: AxisKind): Content {
  return { axisKind, extra: {}, moves: [], setup: {}, zones: [] }
}

/** What is hashed and compared: the file without identity, time, note and readings. */
export function contentOf(file: SettingsFile): Content {
  const { axisKind, extra, moves, setup, zones } = file
  return sortContent({ axisKind, extra, moves, setup, zones })
}

/** The same content with zones by zone and moves by move; the very object where they already are. */
export function sortContent(content: Content): Content {
  const moves = inOrder(content.moves, byMove)
  const zones = inOrder(content.zones, byZone)
  return moves === content.moves && zones === content.zones ? content : { ...content, moves, zones }
}

const byMove = (a: Move, b: Move) => a.move - b.move
const byZone = (a: Zone, b: Zone) => a.zone - b.zone

function inOrder<Row>(rows: readonly Row[], compare: (a: Row, b: Row) => number): readonly Row[] {
  const sorted = rows.every((row, index) => index === 0 || compare(rows[index - 1] ?? row, row) <= 0)
  return sorted ? rows : [...rows].sort(compare)
}
