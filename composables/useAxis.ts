import type { Nameplate } from '#shared/settings/nameplate'
import type { Axis, ChangesAnswer, VersionOne } from '#shared/api/versions'
import type { JudgingContext } from '#shared/api/uploads'

/** An axis with one of its versions, whole, and how that differs from the known-good in force. */
export interface AxisView {
  readonly axis: Axis
  /** Null: never read. */
  readonly version: VersionOne | null
  /** Null: none is marked, or the version is it. */
  readonly compared: { readonly knownGood: VersionOne, readonly answer: ChangesAnswer } | null
  readonly nameplate: Nameplate | undefined
}

/** Reads an axis by its tag, with the version of that number or, without one, what the drive holds today. */
export function useAxis(tag: () => string, number?: () => number) {
  const api = useApi()

  async function nameplateOf(version: VersionOne | null, axis: Axis, signal: AbortSignal): Promise<Nameplate | undefined> {
    const serial = version?.unit.serial ?? axis.unit?.serial
    if (serial === undefined) return undefined
    const channel = version ? version.unit.channel : axis.unit?.channel ?? undefined
    const context = await api.get<JudgingContext>('/api/judging-context', { query: { serial, channel, capturedAt: version?.capturedAt }, signal })
    return context.nameplate ?? undefined
  }

  async function compareWith(axis: Axis, version: VersionOne | null, signal: AbortSignal): Promise<AxisView['compared']> {
    if (!version || !axis.knownGood || axis.knownGood.versionId === version.id) return null
    const [knownGood, answer] = await Promise.all([
      api.get<VersionOne>(`/api/versions/${axis.knownGood.versionId}`, { signal }),
      api.get<ChangesAnswer>(`/api/versions/${version.id}/changes`, { query: { against: axis.knownGood.versionId }, signal }),
    ])
    return { knownGood, answer }
  }

  async function read(signal: AbortSignal): Promise<AxisView> {
    const wanted = number?.()
    const path = `/api/axes/tag:${tag()}`
    const [axis, numbered] = await Promise.all([
      api.get<Axis>(path, { signal }),
      wanted === undefined ? null : api.get<VersionOne>(`${path}/versions/${wanted}`, { signal }),
    ])
    const version = numbered ?? (axis.current ? await api.get<VersionOne>(`/api/versions/${axis.current.versionId}`, { signal }) : null)
    const [compared, nameplate] = await Promise.all([compareWith(axis, version, signal), nameplateOf(version, axis, signal)])
    return { axis, version, compared, nameplate }
  }

  return useRead(read, number ? [tag, number] : [tag])
}
