import type { JudgingContext } from '#shared/api/uploads'
import type { Axis, ChangesAnswer, VersionOne } from '#shared/api/versions'
import type { Nameplate } from '#shared/settings/nameplate'

/** Two versions, before and after, with what differs and what their words hang on. */
export interface ComparisonView {
  readonly before: VersionOne
  readonly after: VersionOne
  readonly answer: ChangesAnswer
  /** The axis of the second. */
  readonly axis: Axis
  readonly nameplate: Nameplate | undefined
  readonly nameplateBefore: Nameplate | undefined
}

/** Where one version is read from: an id, or TAG/NUMBER; undefined for anything else. */
export function versionPath(wanted: string): string | undefined {
  if (/^[1-9]\d{0,15}$/.test(wanted)) return `/api/versions/${wanted}`
  const named = /^([A-Za-z0-9._-]{1,32})\/([1-9]\d{0,9})$/.exec(wanted)
  return named ? `/api/axes/tag:${named[1]}/versions/${named[2]}` : undefined
}

/** Reads the two versions of a comparison; undefined while one of them is not named. */
export function useComparison(a: () => string, b: () => string) {
  const api = useApi()
  const nameplateOf = async ({ unit, capturedAt }: VersionOne, signal: AbortSignal) =>
    (await api.get<JudgingContext>('/api/judging-context', { query: { serial: unit.serial, channel: unit.channel, capturedAt }, signal })).nameplate ?? undefined

  async function read(signal: AbortSignal): Promise<ComparisonView | undefined> {
    const [pathA, pathB] = [versionPath(a()), versionPath(b())]
    if (!pathA || !pathB) return undefined
    const [before, after] = await Promise.all([api.get<VersionOne>(pathA, { signal }), api.get<VersionOne>(pathB, { signal })])
    const [answer, axis, nameplate] = await Promise.all([
      api.get<ChangesAnswer>(`/api/versions/${after.id}/changes`, { query: { against: before.id }, signal }),
      api.get<Axis>(`/api/axes/${after.axisId}`, { signal }),
      nameplateOf(after, signal),
    ])
    const nameplateBefore = before.unit.model === after.unit.model ? nameplate : await nameplateOf(before, signal)
    return { before, after, answer, axis, nameplate, nameplateBefore }
  }
  return useRead(read, [a, b])
}
