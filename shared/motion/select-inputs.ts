/** How a drive counts the moves that its select inputs call. */
export interface Numbering {
  /** Number of its first move. */
  readonly firstMove: 0 | 1
  /** What it calls while all select inputs are off: its first move, or nothing that has a row. */
  readonly allOff: 'first' | 'none' | 'home'
}

/** The binary code that calls a move; negative where the numbering leaves it none. 0 calls no row unless allOff is `first`. */
export function selectCode(move: number, numbering: Numbering): number {
  return move - numbering.firstMove + (numbering.allOff === 'first' ? 0 : 1)
}

/** The number of the move that a code calls, the inverse of `selectCode`; undefined where the code calls no row. */
export function calledMove(code: number, numbering: Numbering): number | undefined {
  if (code === 0 && numbering.allOff !== 'first') return undefined
  return code + numbering.firstMove - (numbering.allOff === 'first' ? 0 : 1)
}

/** The highest number of a move that so many inputs can call; below the first move where they can call none. */
export function highestMove(inputs: number, numbering: Numbering): number {
  return 2 ** inputs - 1 + numbering.firstMove - (numbering.allOff === 'first' ? 0 : 1)
}

/** Whether so many inputs can set the code and the code calls a row. */
export function isCallable(code: number, inputs: number, numbering: Numbering): boolean {
  return code >= (numbering.allOff === 'first' ? 0 : 1) && code < 2 ** inputs
}

/** The inputs that are on for a code, lowest first: input 0 weighs 1, input 1 weighs 2, and so on. */
export function inputsOn(code: number): number[] {
  const on: number[] = []
  for (let input = 0; 2 ** input <= code; input++) {
    if (Math.floor(code / 2 ** input) % 2 === 1) on.push(input)
  }
  return on
}
