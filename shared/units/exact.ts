import { Decimal } from 'decimal.js'

/**
 * Decimal arithmetic that never loses a digit of ours: 40 digits of text times 53 digits of a factor need 93 places of
 * the 160. Only a division by π is rounded, a hundred places below the sixth decimal. Rounds half-even.
 */
export const Exact = Decimal.clone({
  precision: 160, rounding: Decimal.ROUND_HALF_EVEN, toExpNeg: -60, toExpPos: 60, minE: -400, maxE: 400,
})

export type Exact = Decimal
