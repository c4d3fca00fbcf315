import { describe, expect, it } from 'vitest'
import { applyRenumbered } from '../../../../shared/diff/apply-renumbered'
import { invertRenumbered } from '../../../../shared/diff/invert'
import { diffRenumbered } from '../../../../shared/diff/renumber'
import { contentsOf, pictureOf, plain } from './picture'

/* Each text is both what goes in and what must come out; picture.ts says how to read one. */
const pictures: Record<string, string> = {
  'a value edited, nothing renumbered': `
    0 → 0 | absolute  0  250     2000
    1 → 1 | absolute 10  250→300 2000`,

  'a row inserted': `
    0 → 0 | absolute  0  250 2000
    1 → 1 | absolute 10  250 2000
    – → 2 | absolute 75  100 1000
    2 → 3 | absolute 20  250 2000
    3 → 4 | absolute 30  250 2000
    moves 2–3 became 3–4`,

  'a row inserted before all': `
    – → 0 | absolute 75  100 1000
    0 → 1 | absolute  0  250 2000
    1 → 2 | absolute 10  250 2000
    moves 0–1 became 1–2`,

  'a row deleted': `
    0 → 0 | absolute  0  250 2000
    1 → – | absolute 10  250 2000
    2 → 1 | absolute 20  250 2000
    3 → 2 | absolute 30  250 2000
    moves 2–3 became 1–2`,

  'a row deleted with its number left empty': `
    0 → 0 | absolute  0  250 2000
    1 → – | absolute 10  250 2000
    2 → 2 | absolute 20  250 2000`,

  'two rows swapped': `
    0 → 0 | absolute  0  250 2000
    3 → 1 | absolute 30  100 1000
    2 → 2 | absolute 20  250 2000
    1 → 3 | absolute 10  400 3000
    4 → 4 | absolute 40  250 2000
    moves 1–1 became 3–3
    moves 3–3 became 1–1`,

  'a block moved': `
    0 → 0 | absolute  0  250 2000
    4 → 1 | absolute 40  250 2000
    5 → 2 | absolute 50  250 2000
    1 → 3 | absolute 10  250 2000
    2 → 4 | absolute 20  250 2000
    3 → 5 | absolute 30  250 2000
    moves 1–3 became 3–5
    moves 4–5 became 1–2`,

  'a row edited behind an inserted one': `
    0 → 0 | absolute  0  250     2000
    – → 1 | absolute 75  100     1000
    1 → 2 | absolute 10  250     2000
    2 → 3 | absolute 20  250→300 2000
    3 → 4 | absolute 30  250     2000
    moves 1–3 became 2–4`,

  'a row edited inside a moved block': `
    0 → 0 | absolute  0  250     2000
    5 → 1 | absolute 50  250     2000
    6 → 2 | absolute 60  250     2000
    7 → 3 | absolute 70  250     2000
    8 → 4 | absolute 80  250     2000
    1 → 5 | absolute 10  250     2000
    2 → 6 | absolute 20  250→300 2000
    3 → 7 | absolute 30  250     2000
    4 → 8 | absolute 40  250     2000
    moves 1–4 became 5–8
    moves 5–8 became 1–4`,

  'a follower that goes along, and one that does not': `
    0 → 0 | absolute  0  250 2000 next=2⇒3
    – → 1 | absolute 75  100 1000
    1 → 2 | absolute 10  250 2000 next=0
    2 → 3 | absolute 20  250 2000 next=1→3
    3 → 4 | absolute 30  250 2000
    moves 1–3 became 2–4`,

  'a follower whose row is gone while another takes its number': `
    0 → 0 | absolute  0  250 2000 next=1→1
    1 → – | absolute 10  250 2000
    2 → 1 | absolute 20  250 2000
    3 → 2 | absolute 30  250 2000
    4 → 3 | absolute 40  250 2000
    moves 2–4 became 1–3`,

  'a follower that calls no row on either side': `
    0 → 0 | absolute  0  250 2000 next=9
    – → 1 | absolute 75  100 1000
    1 → 2 | absolute 10  250 2000
    moves 1–1 became 2–2`,

  'labels and comments travel with the row': `
    0 → 0 | absolute  0  250 2000 label=Home
    – → 1 | absolute 75  100 1000 label=New
    1 → 2 | absolute 10  250 2000 label=Pick→Take
    2 → 3 | absolute 20  250 2000 comment=–→slow
    moves 1–2 became 2–3`,

  'rows that do the same, one inserted among them': `
    0 → 0 | absolute 10  250 2000
    1 → 1 | absolute 10  250 2000
    – → 2 | absolute 75  100 1000
    2 → 3 | absolute 10  250 2000
    moves 2–2 may have become 3–3`,

  'rows that do the same, with one between them that is sure': `
    – → 0 | absolute 75  100 1000
    0 → 1 | absolute 10  250 2000
    1 → 2 | absolute 10  250 2000
    2 → 3 | absolute 30  250 2000
    moves 0–2 became 1–3`,

  'one of several rows that do the same gone: the numbers that still hold keep theirs': `
    0 → 0 | absolute 10  250 2000
    1 → 1 | absolute 10  250 2000
    2 → – | absolute 10  250 2000
    3 → 3 | absolute 40  250 2000`,

  'unused rows at the end take up the shift': `
    0 → 0 | absolute  0  250 2000
    – → 1 | absolute 75  100 1000
    1 → 2 | absolute 10  250 2000
    2 → 3 | absolute 20  250 2000
    3 → – | absolute  0    0    0
    4 → 4 | absolute  0    0    0
    5 → 5 | absolute  0    0    0
    moves 1–2 became 2–3`,

  'a press moved and edited': `
    – → 0 | absolute  75  100 1000
    0 → 1 | absolute   0  250 2000
    1 → 2 | press    150  100 1000 forceLimit=38→55 approach=140 pressSpeed=5
    2 → 3 | absolute  20  250 2000
    moves 0–2 became 1–3`,

  'one more press beside an edited one: equally many are not left, so numbers pair them': `
    0 → 0 | absolute   0      250 2000
    1 → 1 | press    150→120  100 1000 forceLimit=38→30 approach=140
    – → 2 | press    150      100 1000 forceLimit=55 approach=140
    2 → 3 | absolute  20      250 2000
    3 → 4 | absolute  30      250 2000
    4 → 5 | absolute  40      250 2000
    moves 2–4 became 3–5`,

  'a row replaced at its number': `
    0 → 0 | absolute          0    250     2000
    1 → 1 | absolute→relative 10→5 250→100 2000→900
    2 → 2 | absolute         20    250     2000`,

  'all numbers begin at 1 instead of 0': `
    0 → 1 | absolute  0  250 2000
    1 → 2 | absolute 10  250 2000
    2 → 3 | absolute 20  250 2000
    moves 0–2 became 1–3`,

  'two rows gone and two come between neighbours: the first is taken for the first': `
    0 → 0 | absolute  0    250 2000
    – → 1 | absolute 75    100 1000
    1 → 2 | absolute 10    250 2000
    2 → 3 | absolute 20→21 250 2000
    3 → 4 | absolute 30→31 250 2000
    4 → 5 | absolute 40    250 2000
    moves 1–4 became 2–5`,

  'two rows inserted at different places': `
    0 → 0 | absolute  0  250 2000
    – → 1 | absolute 75  100 1000
    1 → 2 | absolute 10  250 2000
    2 → 3 | absolute 20  250 2000
    – → 4 | absolute 85  100 1000
    3 → 5 | absolute 30  250 2000
    4 → 6 | absolute 40  250 2000
    moves 1–2 became 2–3
    moves 3–4 became 5–6`,

  'a row inserted and one deleted further on: the numbers behind hold again': `
    0 → 0 | absolute  0  250 2000
    – → 1 | absolute 75  100 1000
    1 → 2 | absolute 10  250 2000
    2 → 3 | absolute 20  250 2000
    3 → 4 | absolute 30  250 2000
    4 → – | absolute 40  250 2000
    5 → 5 | absolute 50  250 2000
    moves 1–3 became 2–4`,

  'neighbours swapped': `
    0 → 0 | absolute  0  250 2000
    2 → 1 | relative 20  100 1000
    1 → 2 | absolute 10  400 3000
    3 → 3 | absolute 30  250 2000
    moves 1–1 became 2–2
    moves 2–2 became 1–1`,

  'a row taken to the end': `
    0 → 0 | absolute  0  250 2000
    2 → 1 | absolute 20  250 2000
    3 → 2 | absolute 30  100 1000
    4 → 3 | absolute 40  250 2000
    1 → 4 | absolute 10  400 3000
    moves 1–1 became 4–4
    moves 2–4 became 1–3`,

  'three rows in a ring': `
    0 → 0 | absolute  0  250 2000
    3 → 1 | absolute 30  100 1000
    1 → 2 | absolute 10  400 3000
    2 → 3 | press    20  150 1500 forceLimit=40 approach=15
    4 → 4 | absolute 40  250 2000
    moves 1–2 became 2–3
    moves 3–3 became 1–1`,

  'a chain inserted with its followers': `
    0 → 0 | absolute  0  250 2000 next=1⇒3
    – → 1 | absolute 75  100 1000 next=2
    – → 2 | absolute 76  100 1000
    1 → 3 | absolute 10  250 2000 next=2⇒4 dwell=200
    2 → 4 | absolute 20  250 2000
    3 → 5 | absolute 30  250 2000 next=0
    moves 1–3 became 3–5`,

  'a follower given and one taken away count for what a row does': `
    0 → 0 | absolute  0  250 2000 next=–→3
    – → 1 | absolute 75  100 1000
    1 → 2 | absolute 10  250 2000
    2 → 3 | absolute 20  250 2000 next=3→–
    3 → 4 | absolute 30  250 2000
    moves 1–3 became 2–4`,

  'a block moved on with empty numbers before it': `
    0  → 0  | absolute  0  250 2000
    1  → 10 | absolute 10  250 2000
    2  → 11 | absolute 20  250 2000
    3  → 12 | absolute 30  250 2000
    moves 1–3 became 10–12`,

  'a deceleration written out in a row that moved': `
    – → 0 | absolute 75  100 1000
    0 → 1 | absolute  0  250 2000
    1 → 2 | absolute 10  250 2000 deceleration=–→2000
    2 → 3 | absolute 20  250 2000
    moves 0–2 became 1–3`,

  'a table that was all unused, filled: nothing to tell but edits': `
    0 → 0 | absolute 0→10 0→250 0→2000
    1 → 1 | absolute 0→20 0→250 0→2000
    2 → 2 | absolute 0    0     0`,

  'a table emptied': `
    0 → – | absolute  0  250 2000
    1 → – | absolute 10  250 2000`,

  'a table begun': `
    – → 0 | absolute  0  250 2000 label=Home
    – → 1 | relative -5  250 2000 comment=back`,

  'every second row deleted': `
    0 → 0 | absolute  0  250 2000
    1 → – | absolute 10  250 2000
    2 → 1 | absolute 20  100 1000
    3 → – | absolute 30  250 2000
    4 → 2 | press    40  400 3000 forceLimit=30 approach=35
    5 → – | absolute 50  250 2000
    6 → 3 | relative  6  150 1500
    moves 2–2 became 1–1
    moves 4–4 became 2–2
    moves 6–6 became 3–3`,
}

describe('move tables as pictures', () => {
  it.each(Object.entries(pictures))('%s', (_, picture) => {
    const [before, after] = contentsOf(picture)
    expect(pictureOf(before, after)).toBe(plain(picture))
  })

  it.each(Object.entries(pictures))('%s: applies, and reads backwards', (_, picture) => {
    const [before, after] = contentsOf(picture)
    const reading = diffRenumbered(before, after)
    if (!reading) {
      expect(picture).not.toMatch(/became|become/)
      return
    }
    expect(applyRenumbered(before, reading)).toStrictEqual(after)
    expect(invertRenumbered(reading)).toStrictEqual(diffRenumbered(after, before))
  })
})
