import type { Swap } from '#shared/api/swaps'
import { counted } from '~/utils/format'
import { attemptsOfUnit } from './attempts'
import type { StepNumber } from './steps'
import { begun, replacedWords } from './words'

const toCome: Readonly<Partial<Record<StepNumber, string>>> = {
  3: 'Sheet and files, from here on', 4: 'Isolate and lock out. Block what can fall.', 7: 'Slow, nobody in reach', 9: 'A planner signs, by day',
}

/** A step in a line: what was done, when and by whom; of one that is to come what it wants, where that helps. */
export function summaryOf(swap: Swap, step: StepNumber, done: boolean, when: (iso: string) => string): string {
  return done ? doneWords(swap, step, when) : toCome[step] ?? ''
}

function doneWords(swap: Swap, step: StepNumber, when: (iso: string) => string): string {
  const stamp = (act: { readonly at: string, readonly by: string } | null) => act ? `${when(act.at)}, ${act.by}.` : ''
  switch (step) {
    case 1: return `${when(swap.openedAt)}, ${swap.openedBy}. ${begun(replacedWords[swap.replaced])}${swap.unitOut ? ` ${swap.unitOut.serial}` : ''}, ${swap.failure}.`
    case 2: return `${swap.unitIn?.serial ?? ''}, ${fitWords(swap)}`
    case 3: return swap.kit ? `${swap.kit.scribeCode}. ${stamp(swap.cautions) && `Cautions read ${stamp(swap.cautions)}`}` : ''
    case 4: return `${stamp(swap.safe)}${swap.safe?.blocked ? ` Blocked: ${swap.safe.blocked}.` : ''}`
    case 5: return swap.ticks.written ? `${counted(swap.ticks.lines.length, 'line', 'lines')} written, ${stamp(swap.ticks.written)}` : 'Written, line by line.'
    case 6: return readBackWords(swap, when)
    case 7: return motionWords(swap)
    case 8: return stamp(swap.running)
    case 9: return releaseWords(swap, when)
  }
}

function fitWords({ fit, adjustments, forcesConfirmed, unfit }: Swap): string {
  if (fit === 'unfit') return unfit ? `unfit, allowed by ${unfit.by}.` : 'unfit.'
  if (adjustments.length === 0) return 'fits as it is.'
  return `${counted(adjustments.length, 'value', 'values')} rescaled${forcesConfirmed ? `, confirmed by ${forcesConfirmed.by}` : ''}.`
}

function readBackWords(swap: Swap, when: (iso: string) => string): string {
  const readBacks = attemptsOfUnit(swap)
  const last = readBacks.at(-1)
  if (!last) return ''
  return `${last.compare ? begun(last.compare) : 'Not taken'}, ${when(last.at)}, ${last.by}. ${counted(readBacks.length, 'attempt', 'attempts')}.`
}

function motionWords({ firstMotion }: Swap): string {
  if (!firstMotion) return 'Nothing kept.'
  const done = new Set(firstMotion.results.map(({ item }) => item)).size
  return `${counted(done, 'item', 'items')} at ${firstMotion.speedPercent} %${firstMotion.untried.length > 0 ? `, ${firstMotion.untried.length} untried` : ', all as they should'}.`
}

function releaseWords({ released, asLeft, source }: Swap, when: (iso: string) => string): string {
  if (!released) return ''
  const mark = released.carriedOver && asLeft ? ` The mark moved from v${source?.number ?? '?'} to v${asLeft.number}.` : ''
  return `${when(released.at)}, ${released.by}.${mark}${released.note ? ` ${released.note}` : ''}`
}
