import type { Board } from '#shared/api/board'
import type { Unit } from '#shared/api/places'
import type { Option } from '~/utils/forms/fields'

const mostShown = 12

/** Axes and units to choose from, found by any part of their words as one types. */
export function useChoices() {
  const api = useApi()
  let board: Promise<Board> | undefined

  async function axes(text: string): Promise<Option[]> {
    board ??= api.get<Board>('/api/board')
    try {
      const wanted = text.trim().toLowerCase().split(/\s+/)
      const found = (await board).axes.map(axis => ({ axis, words: `${axis.tag}, ${[axis.role, axis.machine, axis.line, axis.site].filter(Boolean).join(', ')}` }))
        .filter(({ words }) => wanted.every(part => words.toLowerCase().includes(part)))
      return found.slice(0, mostShown).map(({ axis, words }) => ({ value: String(axis.id), label: words }))
    }
    catch (failure) {
      board = undefined
      throw failure
    }
  }

  async function units(text: string): Promise<Option[]> {
    const { items } = await api.get<{ items: Unit[] }>('/api/units', { query: { search: text.trim() || undefined, limit: mostShown } })
    return items.map(unit => ({ value: String(unit.id), label: [unit.channel ? `${unit.serial} channel ${unit.channel}` : unit.serial, unit.model, unit.axis ? `at ${unit.axis.tag}` : unit.state].join(', ') }))
  }

  return { axes, units }
}
