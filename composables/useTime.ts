import { useNow } from '@vueuse/core'

/** Times as words, moving on by themselves; `zone` is the site's, or the first site's where none is given. */
export function useTime(zone?: MaybeRefOrGetter<string | undefined>) {
  const session = useSession()
  const now = useNow({ interval: 30_000 })
  const timeZone = computed(() => toValue(zone) ?? session.me?.sites[0]?.timeZone ?? Intl.DateTimeFormat().resolvedOptions().timeZone)
  return {
    now,
    timeZone,
    zoneWord: computed(() => zoneWord(now.value, timeZone.value)),
    ago: (iso: string) => formatAgo(iso, now.value),
    /** How long it has lasted, without "ago". */
    span: (iso: string) => formatSpan(now.value.getTime() - new Date(iso).getTime()),
    exact: (iso: string) => formatExact(iso, timeZone.value),
    short: (iso: string) => formatShort(iso, timeZone.value, now.value),
    when: (iso: string) => formatWhen(iso, timeZone.value, now.value),
    day: (iso: string) => formatDay(iso, timeZone.value, now.value),
  }
}
