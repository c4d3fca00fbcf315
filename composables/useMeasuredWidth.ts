import { useEventListener, useResizeObserver } from '@vueuse/core'
import type { Ref } from 'vue'

/** A4 landscape between its margins, at 96 px an inch. */
const printWidth = 1030

/** The width that a picture is drawn for: what its box has on the screen, its part of the sheet in print. 0 until it is known. */
export function useMeasuredWidth(box: Ref<HTMLElement | null>, partOfSheet = 1): Ref<number> {
  const measured = ref(0)
  const printing = ref(false)
  useResizeObserver(box, ([entry]) => {
    measured.value = Math.round(entry?.contentRect.width ?? 0)
  })
  useEventListener(window, 'beforeprint', () => {
    printing.value = true
  })
  useEventListener(window, 'afterprint', () => {
    printing.value = false
  })
  return computed(() => printing.value ? Math.round(printWidth * partOfSheet) : measured.value)
}
