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
    for (const signature of table.signatures) this.counts[signature] = this.count(signature) + 1
    this.indexOf = new Int32Array((table.numbers[this.to - 1] ?? -1) + 1).fill(-1)
    for (let index = 0; index < this.to; index += 1) this.indexOf[this.number(index)] = index
  }

  get isEmpty(): boolean {
    return this.from >= this.to
  }

  count(signature: number): number {
    return this.counts[signature] as number
  }

  number(index: number): number {
    return this.table.numbers[index] as number
  }

  signature(index: number): number {
    return this.table.signatures[index] as number
  }

  /** True where the row of this number is in the span and has this signature. */
  holds(number: number, signature: number): boolean {
    const index = this.indexOf[number] ?? -1
    return index >= this.from && index < this.to && this.signature(index) === signature
  }

  takeFirst(): number {
    this.leave(this.signature(this.from))
    this.from += 1
    return this.from - 1
  }

  takeLast(): number {
    this.to -= 1
    this.leave(this.signature(this.to))
    return this.to
  }

  private leave(signature: number): void {
    this.counts[signature] = this.count(signature) - 1
  }
}
