import type { Table } from './table'

/** The rows between two indices of one table, with how often each signature stands among them and where each number is. */
export class Span {
  from = 0
  to: number
  private readonly counts: Int32Array
  private readonly indexOf: Int32Array

  constructor(readonly table: Table, signatures: number) {
    this.to = table.numbers.length
    this.counts = new Int32Array(signatures)
    for (const signature of table.signatures) this.counts[signature]! += 1
    this.indexOf = new Int32Array((table.numbers[this.to - 1] ?? -1) + 1).fill(-1)
    for (let index = 0; index < this.to; index += 1) this.indexOf[table.numbers[index]!] = index
  }

  get isEmpty(): boolean {
    return this.from >= this.to
  }

  count(signature: number): number {
    return this.counts[signature]!
  }

  number(index: number): number {
    return this.table.numbers[index]!
  }

  signature(index: number): number {
    return this.table.signatures[index]!
  }

  /** True where the row of this number is in the span and has this signature. */
  holds(number: number, signature: number): boolean {
    const index = this.indexOf[number] ?? -1
    return index >= this.from && index < this.to && this.signature(index) === signature
  }

  takeFirst(): number {
    this.counts[this.signature(this.from)]! -= 1
    this.from += 1
    return this.from - 1
  }

  takeLast(): number {
    this.to -= 1
    this.counts[this.signature(this.to)]! -= 1
    return this.to
  }
}
