import { describe, expect, it } from 'vitest'
import { rules } from '../../../../shared/checks/table'
import { levels } from '../../../../shared/checks/types'
import { ruleTests } from '../../../../utils/help/tests'
import { findRules, isTold, ruleEntries } from '../../../../utils/help/rules'
import { levelWords, tradeWords } from '../../../../utils/help/words'
import { sourceFiles, sourceText } from '../../../support/source-tree'

/** The titles of the tests in the text of a test file. */
function titlesIn(text: string): string[] {
  return [...text.matchAll(/^ *it(?:\.each\([^)]*\))?\('(.*)', (?:async )?\(/gm)].map(([, title = '']) => title)
}

describe('the rules of the help page', () => {
  it('are those of the table in its order, then those over several axes', () => {
    expect(ruleEntries.map(entry => entry.id)).toEqual([...rules.map(rule => rule.id), 'sister-outlier', 'address-twice'])
    expect(ruleEntries.filter(entry => entry.live).map(entry => entry.id)).toEqual(['sister-outlier', 'address-twice'])
    expect(new Set(ruleEntries.map(entry => entry.id)).size).toBe(ruleEntries.length)
  })

  it('each have a worked example at a level that they can reach', () => {
    for (const { id, example, levels: reached } of ruleEntries) expect(reached, id).toContain(example?.level)
  })

  it('name a test file that is there', () => {
    const files = new Set(sourceFiles('tests/unit/shared/checks'))
    expect(ruleEntries.filter(entry => !files.has(entry.test)).map(entry => entry.test)).toEqual([])
  })

  it('name four tests each, by titles that stand in that file: one passes, one is told, one is the border, one lacks a value', () => {
    expect(Object.keys(ruleTests)).toEqual(ruleEntries.map(entry => entry.id))
    for (const { id, test, tests } of ruleEntries) {
      const titles = titlesIn(sourceText(test))
      const named = Object.values(tests ?? {})
      expect(new Set(named).size, id).toBe(4)
      expect(named.filter(title => titles.filter(one => one === title).length !== 1), id).toEqual([])
    }
  })

  it('find titles of tests, and no other text', () => {
    expect(titlesIn('  it(\'a b: 1\', () => {\n  it.each(rows)(\'c\', (x) => {\n  const it = \'no\'\n  // it(\'neither\', () => {\n')).toEqual(['a b: 1', 'c'])
  })

  it('are found by all words together, in any order and any case', () => {
    const ids = (wanted: string) => findRules(ruleEntries, wanted).map(entry => entry.id)
    expect(ids('  ')).toEqual(ruleEntries.map(entry => entry.id))
    expect(ids('sister AGREE')).toEqual(['sister-outlier'])
    expect(ids('TRAVEL-SPAN')).toContain('travel-span')
    expect(ids('travel-span sister')).toEqual([])
  })

  it('know an id of theirs from one of another rule set', () => {
    expect([isTold('travel-span'), isTold('address-twice'), isTold('gone-rule')]).toEqual([true, true, false])
  })
})

describe('the words of the help page', () => {
  it('stand in the order of the alphabet, each once, without a stop at the end', () => {
    const words = tradeWords.map(entry => entry.word)
    expect(words).toEqual([...new Set(words)].sort((a, b) => a.localeCompare(b, 'en')))
    for (const { means } of tradeWords) expect(means).not.toMatch(/\.$/)
  })
  it('tell of every level', () => {
    expect(Object.keys(levelWords).sort()).toEqual([...levels].sort())
  })
})
