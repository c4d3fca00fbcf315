import type { Neighbours } from '#shared/api/neighbours'
import type { ValuesAnswer } from '#shared/api/values'
import type { Axis } from '#shared/api/versions'
import type { ValuePlace } from '#shared/settings/value-place'
import { sisterOf } from '~/utils/words/values'

/** More lines than this tell nothing apart. */
const most = 8

/** The same value of the axes that are like one, read when they are asked for; nothing before that. */
export function useSisters(tag: () => string, place: () => ValuePlace) {
  const api = useApi()
  const wanted = ref(false)
  const values = async (axis: string, signal: AbortSignal) => {
    const { section, field, row } = place()
    return api.get<ValuesAnswer>(`/api/axes/tag:${axis}/values`, { query: { section, field, ...(row !== undefined && { row }) }, signal })
  }
  const read = useRead(async (signal) => {
    if (!wanted.value) return undefined
    const axis = await api.get<Axis>(`/api/axes/tag:${tag()}`, { signal })
    const { sisters } = await api.get<Neighbours>(`/api/machines/${axis.machine.id}/neighbours`, { signal })
    const tags = sisters.find(({ axes }) => axes.some(sister => sister.tag === axis.tag))?.axes.map(sister => sister.tag).filter(each => each !== axis.tag) ?? []
    return { sisters: await Promise.all(tags.slice(0, most).map(async each => sisterOf(each, await values(each, signal)))), more: Math.max(0, tags.length - most) }
  }, [wanted, () => JSON.stringify([tag(), place()])])
  return { wanted, ...read }
}
