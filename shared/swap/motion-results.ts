/** The result that holds of each item of the first motion: the newest, in the order in which the items were first tried. */
export function standingResults<Result extends { readonly item: string }>(results: readonly Result[]): Result[] {
  return [...new Map(results.map(result => [result.item, result])).values()]
}
