import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import { BaseButton, BaseField, BasePageFoot, BaseProblem, BaseSection, BaseSelect } from '#components'
import { ApiProblem, toProblem } from '~/utils/api-problem'

const full = new ApiProblem({ type: 'about:blank', title: 'The file was not stored.', status: 507, code: 'disk-full', detail: 'The vault’s disk is full (507).' })

describe('a field', () => {
  it('ties its label and its error to the input', async () => {
    const field = await mountSuspended(BaseField, { props: { label: 'Serial', error: '1 to 64 of A-Z a-z 0-9 . _ / -' }, attrs: { autocomplete: 'off' } })
    const input = field.get('input')
    expect(field.get('label').attributes('for')).toBe(input.attributes('id'))
    expect(input.attributes()).toMatchObject({ 'aria-invalid': 'true', 'autocomplete': 'off' })
    expect(field.get(`#${input.attributes('aria-describedby')}`).text()).toBe('1 to 64 of A-Z a-z 0-9 . _ / -')
  })

  it('hands on what is typed', async () => {
    const field = await mountSuspended(BaseField, { props: { label: 'Serial' } })
    await field.get('input').setValue('HL40-25-01431')
    expect(field.emitted('update:modelValue')).toEqual([['HL40-25-01431']])
  })

  it('chooses a number as a number', async () => {
    const select = await mountSuspended(BaseSelect, { props: { label: 'Site', options: [{ value: 7, label: 'North hall' }], empty: 'Choose a site' } })
    await select.findAll('option')[1]?.setValue()
    expect(select.emitted('update:modelValue')).toEqual([[7]])
  })
})

describe('a button', () => {
  it('keeps its words for its width while it is busy, and cannot be pressed', async () => {
    const button = await mountSuspended(BaseButton, { props: { busy: true }, slots: { default: () => 'Keep them' } })
    expect(button.findAll('.word').map(word => word.text())).toEqual(['Keep them', 'sending'])
    expect(button.attributes('disabled')).toBeDefined()
    expect(button.attributes('aria-busy')).toBe('true')
  })

  it('is a link where it has an address', async () => {
    const link = await mountSuspended(BaseButton, { props: { to: '/upload' }, slots: { default: () => 'Upload' } })
    expect(link.element.tagName).toBe('A')
    expect(link.attributes('href')).toBe('/upload')
  })
})

describe('a problem', () => {
  it('says what happened, what is safe and offers one button', async () => {
    const shown = await mountSuspended(BaseProblem, { props: { problem: full, safe: 'The file is still in this page.', action: 'Send it again' } })
    expect(shown.attributes('role')).toBe('alert')
    expect(shown.get('p').text()).toBe('The file was not stored. The vault’s disk is full (507). The file is still in this page.')
    await shown.get('button').trigger('click')
    expect(shown.emitted('again')).toHaveLength(1)
  })

  it('ends the title and does not say it twice', async () => {
    const problem = new ApiProblem({ ...full.problem, title: 'E-mail or password is wrong', detail: 'E-mail or password is wrong.' })
    expect((await mountSuspended(BaseProblem, { props: { problem } })).text()).toBe('E-mail or password is wrong.')
  })

  it('names the place and what was probably meant', async () => {
    const problem = new ApiProblem({ ...full.problem, errors: [{ at: '/setup/thrustLimt', line: 12, column: 5, code: 'key-unknown', message: 'thrustLimt is no field.', meant: 'thrustLimit' }], more: 4 })
    const lines = (await mountSuspended(BaseProblem, { props: { problem } })).findAll('li').map(line => line.text().replace(/\s+/g, ' '))
    expect(lines).toEqual(['line 12, column 5 thrustLimt is no field. Meant: thrustLimit?', 'and 4 more'])
  })

  it('reads problem details, tells no answer from an odd one', () => {
    expect(toProblem({ statusCode: 507, data: full.problem }).problem).toEqual(full.problem)
    expect(toProblem(new TypeError('fetch failed')).unanswered).toBe(true)
    const odd = toProblem({ statusCode: 502, data: '<html>' })
    expect([odd.unanswered, odd.code, odd.problem.status]).toEqual([false, 'unreadable-answer', 502])
  })
})

describe('section and plate', () => {
  it('names the section by its title', async () => {
    const section = await mountSuspended(BaseSection, { props: { title: 'Every axis' }, slots: { end: () => '46 of 46' } })
    expect(section.get(`#${section.attributes('aria-labelledby')}`).text()).toBe('Every axis')
    expect(section.get('.end').text()).toBe('46 of 46')
  })

  it('says as of when, with the zone named', async () => {
    const foot = await mountSuspended(BasePageFoot, { props: { sheet: 'Board', asOf: '2026-12-01T06:42:10Z', timeZone: 'Europe/Berlin', entries: 48211 } })
    expect(foot.get('time').text()).toBe('Tue 1 Dec 2026 07:42:10 CET (UTC+1)')
    expect(foot.text()).toContain('48 211 entries')
  })
})
