import type { BoardAxis } from '#shared/api/board'

const bare = (text: string) => text.toLowerCase().replace(/[^a-z0-9]/g, '')

/** Axes that hold these characters one after another in their tag, dots and dashes aside; those that end in them first. */
export function axesByLetters(axes: readonly BoardAxis[], letters: string): BoardAxis[] {
  const wanted = bare(letters)
  if (wanted === '') return []
  const ends = (axis: BoardAxis) => Number(!bare(axis.tag).endsWith(wanted))
  return axes.filter(axis => bare(axis.tag).includes(wanted)).sort((a, b) => ends(a) - ends(b) || a.tag.localeCompare(b.tag, 'en', { numeric: true }))
}
