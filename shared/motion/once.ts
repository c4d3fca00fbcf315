/**
 * The same function, reckoning once for each object that it is given, by identity: nobody may change the object afterwards. The
 * answer is kept no longer than the object, and is one and the same for all who ask.
 */
export function onceFor<Given extends object, Answer extends object>(reckon: (given: Given) => Answer): (given: Given) => Answer {
  const known = new WeakMap<Given, Answer>()
  return (given) => {
    const before = known.get(given)
    if (before) return before
    const answer = reckon(given)
    known.set(given, answer)
    return answer
  }
}
