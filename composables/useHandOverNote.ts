/** A pause in writing after which the note is kept, in ms. */
const pause = 8000

/**
 * The hand-over note while it is written: kept by the vault when the field is left and after a pause, so that another device
 * finds it. Where another device wrote meanwhile it is sent as following on what stood here, and the vault says so.
 */
export function useHandOverNote(kept: () => string, rev: () => number, keep: (note: string, rev: number) => void) {
  const note = ref('')
  /** What stands here was not kept yet. */
  const open = ref(false)
  let begun = { text: '', rev: 0 }

  watch(kept, (now) => {
    if (open.value) return
    note.value = now
    begun = { text: now, rev: rev() }
  }, { immediate: true })

  function settle(): void {
    if (!open.value) return
    open.value = false
    const before = begun
    begun = { text: note.value, rev: rev() }
    if (note.value !== kept()) keep(note.value, kept() === before.text ? rev() : before.rev)
  }
  const later = useDebounceFn(settle, pause)
  const written = computed({
    get: () => note.value,
    set: (text) => {
      if (!open.value) begun = { text: kept(), rev: rev() }
      note.value = text
      open.value = true
      void later()
    },
  })
  /** It goes with the hand-over itself: nothing of it is left to keep. */
  const handedOver = () => { open.value = false }

  useEventListener(document, 'visibilitychange', () => { if (document.visibilityState === 'hidden') settle() })
  onScopeDispose(settle)
  return { note: written, settle, handedOver }
}
