/*
 * What a field takes up to its borders, and what it refuses just beyond them, by a few words: `text 1 80`, `whole 0 65535`,
 * `number >0 60000`, `id`, `list 1 4 of one upload/read`.
 */

/** One field: its name in a body, whether it may be left out or null, and its kind with its least and greatest. */
export interface Bound { readonly path: string, readonly optional: boolean, readonly nullable: boolean, readonly kind: string, readonly args: readonly string[] }

const long = (length: number) => 'x'.repeat(length)
const at = '2026-11-30T08:15:00.000Z'
/** RFC 3339, section 5.8, but for its leap seconds, which no clock of ours shows. */
const times = [at, '1985-04-12T23:20:50.52Z', '1996-12-19T16:39:57-08:00', '1937-01-01T12:00:27.87+00:20', '2028-02-29T00:00:00Z', '2026-11-30T23:59:59+14:00']
const noTimes = ['2026-11-30', '2026-11-30T08:15:00', '30.11.2026 08:15', '2026-02-30T00:00:00Z', '2027-02-29T00:00:00Z', '2026-11-30T24:00:00Z', '2026-11-30T08:60:00Z', '2026-13-01T00:00:00Z', '2026-11-30T08:15:00+0100', '', 'now']

export interface Cases { readonly taken: readonly unknown[], readonly refused: readonly unknown[] }
const numbers = (least: string, most: string, whole: boolean): Cases => {
  const above = least.startsWith('>'), low = least === '-' ? -1e9 : Number(least.replace('>', '')), high = most === '-' ? Number.MAX_SAFE_INTEGER : Number(most)
  const step = whole ? 1 : 0.001
  return { taken: [above ? low + step : low, high], refused: [...least === '-' ? [] : [above ? low : low - step], ...most === '-' ? [] : [high + step], ...whole ? [least === '-' ? 0.5 : Math.min(low + 1, high) - 0.5] : []] }
}
const oneOf = (words: readonly string[]): Cases => ({ taken: words, refused: ['no-such', words[0]?.toUpperCase() === words[0] ? words[0]?.toLowerCase() : words[0]?.toUpperCase(), ''] })

/** Values at the border and just beyond it; in a query all of them as text. */
export function casesOf({ kind, args: [first = '', second = '', , ...rest] }: Bound): Cases {
  switch (kind) {
    case 'text': return { taken: [long(Number(first)), long(Number(second))], refused: [long(Number(second) + 1), ...first === '0' ? [] : [long(Number(first) - 1)]] }
    case 'whole': return numbers(first, second, true)
    case 'number': return numbers(first, second, false)
    case 'id': return { taken: [1, Number.MAX_SAFE_INTEGER], refused: [0, -1, 1.5, 2 ** 53] }
    case 'flag': return { taken: [true, false], refused: ['true', 0, 1] }
    case 'only': return { taken: [true], refused: [false, 'true', 1] }
    case 'one': return oneOf(first.split('/'))
    case 'time': return { taken: times, refused: noTimes }
    case 'email': return { taken: ['runa@larkfield.example', 'a.b+c@x-y.example'], refused: ['runa', 'runa@', '@larkfield.example', 'runa haldersen@larkfield.example', ''] }
    case 'tag': return { taken: ['a', 'LID-02.Z_1', long(32)], refused: ['', long(33), 'LID 02', 'LID/02', 'ß'] }
    case 'serial': return { taken: ['a', 'HL40-2231/0087', long(64)], refused: ['', long(65), 'HL40 2231', 'ß'] }
    case 'axis': return { taken: ['1', 'tag:LID-02.Z'], refused: ['0', 'LID-02.Z', 'tag:', ''] }
    case 'list': return listCases(Number(first), Number(second), rest)
    default: throw new RangeError(`No such kind: ${kind}`)
  }
}

function listCases(least: number, most: number, [kind, ...args]: readonly string[]): Cases {
  if (kind === undefined) return { taken: [], refused: [...least === 0 ? [] : [[]], 'x', null] }
  const { taken, refused } = casesOf({ path: '', optional: false, nullable: false, kind, args })
  const some = taken[0]
  const many = (length: number) => Array.from({ length }, () => some)
  return { taken: [many(least), many(most), taken.slice(0, most)], refused: [many(most + 1), ...least === 0 ? [] : [many(least - 1)], ...refused.map(one => [one]), some, 'x'] }
}
