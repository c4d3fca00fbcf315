import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import { ChecksRows } from '#components'
import HelpPage from '~/pages/help.vue'
import { ruleEntries } from '~/utils/help/rules'

const words = (text: string | null) => (text ?? '').replace(/\s+/g, ' ').trim()

describe('the help page', () => {
  it('tells each rule at an anchor of its own, with its name as heading', async () => {
    const page = await mountSuspended(HelpPage, { route: '/help' })
    expect(words(page.get('h1').text())).toBe(`${ruleEntries.length} rules judge an axis`)
    const articles = page.findAll('article')
    expect(articles.map(article => article.attributes('id'))).toEqual(ruleEntries.map(entry => entry.id))
    for (const article of articles) expect(article.get(`#${article.attributes('aria-labelledby')}`).element.tagName).toBe('H3')
    const span = words(page.get('#travel-span').text())
    expect(span).toContain('205 − 0 = 205')
    expect(span).toContain('tests/unit/shared/checks/travel-span.test.ts')
  })

  it('names the tests of each rule by their titles, at an anchor that the line of the rule leads to', async () => {
    const page = await mountSuspended(HelpPage, { route: '/help' })
    for (const { id, test, tests } of ruleEntries) {
      const place = page.get(`article #${id}-tests`)
      expect(words(place.get('code').text())).toBe(test)
      expect(place.findAll('dl dd').map(each => words(each.text())), id).toEqual(Object.values(tests ?? {}).map(words))
    }
    const links = page.findAll('tbody td a')
    expect(links.map(link => link.attributes('href'))).toEqual(ruleEntries.map(entry => `/help#${entry.id}-tests`))
    // The words that are seen are part of the name that is heard (WCAG 2.2, 2.5.3).
    for (const [index, { test }] of ruleEntries.entries()) expect(words(links[index]!.text())).toBe(test)
  })

  it('has a line for each rule that leads to its anchor', async () => {
    const page = await mountSuspended(HelpPage, { route: '/help' })
    const rows = page.findAll('tbody th[scope="row"] a')
    expect(rows.map(link => link.attributes('href'))).toEqual(ruleEntries.map(entry => `/help#${entry.id}`))
    expect(page.get('table caption').text()).toBe('The rules')
  })

  it('leaves the rules that have the words, and says when none has', async () => {
    const page = await mountSuspended(HelpPage, { route: '/help' })
    await page.get('input[type="search"]').setValue('sister-outlier')
    expect(page.findAll('article').map(article => article.attributes('id'))).toEqual(['sister-outlier'])
    await page.get('input[type="search"]').setValue('no such words')
    expect(page.findAll('article')).toEqual([])
    expect(page.text()).toContain('No rule has all of these words.')
  })

  it('has the cautions, the command of a script and the words of the trade', async () => {
    const text = words((await mountSuspended(HelpPage, { route: '/help' })).text())
    for (const part of ['Isolate and lock out', '/api/uploads?occasion=routine', 'Reflected mass', '202']) expect(text).toContain(part)
  })
})

describe('the rule of a check', () => {
  it('leads to the help page; one of an older rule set stands bare', async () => {
    const line = { key: '1', level: 'note', message: 'Two things.', places: '', rules: ['travel-span', 'gone-rule'], results: [] } as const
    const rows = await mountSuspended(ChecksRows, { props: { lines: [line], caption: 'Notes' } })
    expect(rows.findAll('a').map(link => link.attributes('href'))).toEqual(['/help#travel-span'])
    expect(words(rows.get('td:last-child').text())).toMatch(/travel-span ?, gone-rule/)
  })
})
