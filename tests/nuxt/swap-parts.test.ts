import { mountSuspended } from '@nuxt/test-utils/runtime'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { BaseChoices, SwapAsFound, SwapAttempt, SwapChainCard, SwapHoldButton, SwapMissingKeys, SwapScan, SwapStepMotion, SwapTwoCodes } from '#components'
import { storedContent } from '~/utils/stored-content'
import { axis } from '../support/axis-answers'
import { attempt, begun, differing, readBack, swapKit } from '../support/swap-answers'
import { soon } from '../support/soon'

vi.setConfig({ testTimeout: 30_000 })

const words = (text: string) => text.replace(/\s+/g, ' ').trim()

describe('a confirmation that is held', () => {
  beforeEach(() => {
    vi.useFakeTimers({ toFake: ['performance', 'requestAnimationFrame', 'cancelAnimationFrame', 'setTimeout', 'clearTimeout'] })
  })
  afterEach(() => {
    vi.useRealTimers()
    vi.unstubAllGlobals()
  })
  async function held() {
    const mounted = await mountSuspended(HoldStub)
    const button = mounted.get('button')
    Object.assign(button.element, { setPointerCapture: () => {} })
    return { mounted, button, count: () => mounted.getComponent(SwapHoldButton).emitted('held')?.length ?? 0 }
  }
  const HoldStub = { components: { SwapHoldButton }, template: '<SwapHoldButton hint="Nothing is written.">all five are done</SwapHoldButton>' }
  const pass = async (ms: number) => {
    await vi.advanceTimersByTimeAsync(ms)
    await nextTick()
  }

  it('is confirmed after a second by pointer, and its stroke is then in line', async () => {
    const { button, count } = await held()
    expect(button.get('.lower').attributes('x')).toBe('20.7')
    await button.trigger('pointerdown', { button: 0 })
    await pass(500)
    expect(Number(button.get('.lower').attributes('x'))).toBeLessThan(17)
    expect(count()).toBe(0)
    await pass(600)
    expect([count(), button.get('.lower').attributes('x')]).toEqual([1, '10.5'])
    await button.trigger('pointerup')
    await button.trigger('click')
    expect(count()).toBe(1)
  })

  it('is not confirmed by letting go early, nor by a tremble', async () => {
    const { button, count } = await held()
    for (let times = 0; times < 2; times += 1) {
      await button.trigger('pointerdown', { button: 0 })
      await pass(150)
      await button.trigger('pointerup')
      await button.trigger('click')
    }
    expect(count()).toBe(0)
    expect(button.text()).toBe('Press once more')
  })

  it('is confirmed by two presses that are apart, and forgets the first after a while', async () => {
    const { button, count } = await held()
    await button.trigger('click')
    await pass(600)
    await button.trigger('click')
    expect(count()).toBe(1)
    const other = await held()
    await other.button.trigger('click')
    await pass(9000)
    expect(words(other.button.text())).toBe('Hold: all five are done')
    await other.button.trigger('click')
    expect(other.count()).toBe(0)
  })

  it('is held by the space bar, and not by the repeats of Enter', async () => {
    const { button, count } = await held()
    await button.trigger('keydown', { key: ' ' })
    await pass(1100)
    expect(count()).toBe(1)
    const enter = await held()
    const repeat = new KeyboardEvent('keydown', { key: 'Enter', repeat: true, cancelable: true })
    enter.button.element.dispatchEvent(repeat)
    expect(repeat.defaultPrevented).toBe(true)
  })

  it('jumps at the end where motion is reduced', async () => {
    vi.stubGlobal('matchMedia', (query: string) => ({ matches: query.includes('reduce'), media: query, addEventListener: () => {}, removeEventListener: () => {} }))
    const { button, count } = await held()
    await button.trigger('pointerdown', { button: 0 })
    await pass(700)
    expect([count(), button.get('.lower').attributes('x')]).toEqual([0, '20.7'])
    await pass(400)
    expect([count(), button.get('.lower').attributes('x')]).toEqual([1, '10.5'])
  })

  it('says how to hold it', async () => {
    const { mounted, button } = await held()
    expect(mounted.get(`#${button.attributes('aria-describedby')}`).text()).toMatch(/^Nothing is written\. Hold for 1 s.*space bar.*presses twice\.$/)
  })
})

describe('a read-back', () => {
  const props = { kitCode: 'TBJCX-BNNQC', axisKind: 'linear' as const, nameplate: undefined, timeZone: 'Europe/Berlin', modelValue: [] }

  it('shows two codes with the joint between, off or in line', async () => {
    const off = await mountSuspended(SwapTwoCodes, { props: { kit: 'TBJCX-BNNQC', readBack: 'NBSYZ-7A76A', off: 3 } })
    expect(off.get('svg').attributes('aria-label')).toBe('off: 3 values differ from the kit')
    const line = await mountSuspended(SwapTwoCodes, { props: { kit: 'TBJCX-BNNQC', readBack: 'TBJCX-BNNQC', off: 0 } })
    expect(line.get('svg').attributes('aria-label')).toBe('in line with the kit')
    expect(line.get('.lower').attributes('x')).toBe('6')
  })

  it('says what to write again: the wanted value large, what the drive holds small', async () => {
    const shown = await mountSuspended(SwapAttempt, { props: { ...props, attempt: differing } })
    expect(words(shown.text())).toContain('Differs in 2 values. Write them again.')
    const [first, second] = shown.findAll('ul > li')
    expect(words(first?.text() ?? '')).toBe('Soft limit, max setup184.5 mm the drive holds 185written again')
    expect(words(second?.text() ?? '')).toContain('Dwell move 3')
    await first?.get('input').setValue(true)
    expect(shown.emitted('update:modelValue')).toEqual([[['setup  softLimitMax']]])
    expect(words(shown.text())).toContain('Home offset, proved−1.42mm, was −1.35')
  })

  it('tells a half-written table as rows, not as a page of values', async () => {
    const rows = [{ section: 'move' as const, row: 6 }, { section: 'move' as const, row: 7 }]
    const gone = rows.map(({ row }) => ({ at: `/moves/${row}/target`, section: 'move' as const, row, field: 'target', before: 1, weight: 'harm' as const, watched: false }))
    const shown = await mountSuspended(SwapAttempt, { props: { ...props, attempt: attempt(1, { compare: 'differs', rowsMissing: rows, differences: gone }) } })
    expect(words(shown.text())).toContain('The table was written in part. Not in the drive: move 6 and move 7. Write them whole.')
    expect(shown.findAll('ul > li')).toHaveLength(0)
  })

  it('of another unit says so, keeps the attempt and says what to do', async () => {
    const shown = await mountSuspended(SwapAttempt, { props: { ...props, attempt: attempt(2, { problem: 'serial', compare: null, scribeCode: null, detail: 'The file is of HL40-24-00552, the unit in is HL40-25-00958.' }) } })
    expect(words(shown.text())).toMatch(/^Another unit\. The file is of HL40-24-00552, .*Look at the plate, read the right drive and upload that\. Attempt 2, .* It is kept\.$/)
  })

  it('asks once for keys that the firmware lacks; what weighs harm wants a planner’s name', async () => {
    const shown = await mountSuspended(SwapMissingKeys, { props: { keys: [{ key: 'extra:K-021', weight: 'harm', accepted: false }], unit: 'HL40-200V, firmware 3.14', planner: false, busy: false } })
    const button = shown.get('button')
    const [reason, planner] = shown.findAll('input')
    await reason?.setValue('not in the list of 3.14')
    expect(button.attributes('disabled')).toBeDefined()
    await planner?.setValue('Runa Haldersen')
    await shown.get('form').trigger('submit')
    expect(shown.emitted('accept')?.[0]).toEqual([{ keys: ['extra:K-021'], reason: 'not in the list of 3.14', allowedBy: 'Runa Haldersen' }, 'extra:K-021 not in this firmware'])
  })
})

describe('a chain', () => {
  it('is drawn as one, with what happens between', async () => {
    const chain = await mountSuspended(SwapChainCard, { props: { moves: [3, 4, 5], content: storedContent(swapKit.content), endless: false } })
    expect(chain.findAll('li').map(item => words(item.text()))).toEqual(['3Ease off to 96.5 mm', 'waits 0.12 s, then by itself', '4Clear lid to 62 mm', 'at once, by itself', '5Up to 5 mm, stands'])
  })
})

describe('the first motion', () => {
  const props = { swap: readBack, kits: new Map([[10, swapKit]]), nameplate: undefined, waiting: [], busy: false, looked: false, speed: 10 }

  it('goes item by item; a fault wants words, and stays open until repeated', async () => {
    const step = await mountSuspended(SwapStepMotion, { props })
    const press = (word: string) => step.findAll('button').find(button => words(button.text()) === word)?.trigger('click')
    expect(words(step.get('.now').text())).toContain('Jog positive: extends, downwards.')
    await press('Fault')
    await step.get('textarea').setValue('went the other way')
    await step.get('form').trigger('submit')
    expect(step.emitted('result')?.[0]).toEqual([{ speedPercent: 10, results: [{ item: 'jog', outcome: 'fault', text: 'went the other way' }] }, 'jog, fault: went the other way'])
    const faulty = { ...readBack, firstMotion: { speedPercent: 10, untried: ['brake-hold', 'move-0', 'chain-3'], results: [{ item: 'jog', outcome: 'fault' as const, text: 'went the other way', by: 'Tobias Achterberg', at: '2026-11-30T08:40:00.000Z' }] } }
    await step.setProps({ swap: faulty })
    expect(words(step.get('.now').text())).toContain('Jog positive')
    expect(step.text()).not.toContain('untried')
    expect(words(step.get('.now').text())).toMatch(/“went the other way”.*As it should$/)
  })

  it('shows each result of an item that was repeated, the newest first, those of one moment too', async () => {
    const at = '2026-11-30T08:40:00.000Z'
    const told = (outcome: 'ok' | 'fault', text: string | null, when = at) => ({ item: 'jog', outcome, text, by: 'Tobias Achterberg', at: when })
    const results = [told('fault', 'went the other way'), told('fault', 'still the other way'), told('ok', null, '2026-11-30T08:52:00.000Z')]
    const step = await mountSuspended(SwapStepMotion, { props: { ...props, swap: { ...readBack, firstMotion: { speedPercent: 10, untried: ['brake-hold', 'move-0', 'chain-3'], results } } } })
    expect(step.findAll('.result').map(each => words(each.text()).replace(/^(fault|as it should) .*?(\d\d:\d\d)/, '$1 $2'))).toEqual([
      'as it should 09:52 CET, Tobias Achterberg', 'fault 09:40 CET, Tobias Achterberg: “still the other way”', 'fault 09:40 CET, Tobias Achterberg: “went the other way”',
    ])
    expect(words(step.get('.now').text())).toContain('Enable off')
  })

  it('says the inputs that call a move, and draws a chain', async () => {
    const ok = (item: string) => ({ item, outcome: 'ok' as const, text: null, by: 'Tobias Achterberg', at: '2026-11-30T08:40:00.000Z' })
    const step = await mountSuspended(SwapStepMotion, { props: { ...props, swap: { ...readBack, firstMotion: { speedPercent: 10, untried: ['move-0', 'chain-3'], results: [ok('jog'), ok('brake-hold')] } } } })
    expect(words(step.get('.now').text())).toContain('Call 0, all select inputs off. 0 Top, rest: up to 5 mm. 1.1 s')
    await step.findAll('.line button').find(button => button.text().startsWith('3→4→5'))?.trigger('click')
    expect(words(step.get('.now').text())).toContain('Call 3, select inputs 1, 2 on.')
    expect(step.findAll('.chain .bal').map(balloon => balloon.text())).toEqual(['3', '4', '5'])
  })

  it('is not offered while a taught value is missing', async () => {
    const step = await mountSuspended(SwapStepMotion, { props: { ...props, swap: { ...readBack, taughtMissing: ['positionGain', 'velocityGain'] } } })
    expect(words(step.text())).toContain('Not yet: 2 values are still to be taught.')
    expect(step.findAll('[role="img"][aria-label="empty"]')).toHaveLength(2)
    expect(step.find('.now').exists()).toBe(false)
  })
})

describe('a file as found that differs', () => {
  const asFound = { versionId: 20, number: 15, capturedAt: '2026-11-30T01:10:00.000Z', scribeCode: 'TM112-VD2HP', serial: 'HL40-23-00417', compare: 'differs' as const }
  const chosen = { decidedBy: 'Runa Haldersen', reason: 'the new lids are lower' }
  const offered = async (source: typeof begun.source) => {
    const shown = await mountSuspended(SwapAsFound, { props: { swap: { ...begun, asFound, source }, axis, axisKind: 'linear', nameplate: undefined, settled: false, busy: false } })
    return shown.getComponent(BaseChoices).findAll('label').map(label => words(label.text()).replace(/, .*$/, ''))
  }
  it('leaves both to be chosen, also once the other was decided for', async () => {
    expect(await offered(begun.source)).toEqual(['v14', 'v15'])
    expect(await offered({ ...asFound, released: false, mark: null, chosen })).toEqual(['v14', 'v15'])
  })
})

describe('a label', () => {
  afterEach(() => vi.unstubAllGlobals())

  it('is read by camera where the browser can, and leads to its axis', async () => {
    const stopped = vi.fn()
    vi.stubGlobal('BarcodeDetector', class {
      static getSupportedFormats = async () => ['qr_code']
      detect = async () => [{ rawValue: 'https://vault.larkfield.example/axes/LID-02.Z' }]
    })
    vi.stubGlobal('navigator', Object.assign(Object.create(navigator) as Navigator, { mediaDevices: { getUserMedia: async () => ({ getTracks: () => [{ stop: stopped }] }) } }))
    HTMLVideoElement.prototype.play = async () => {}
    Object.defineProperty(HTMLVideoElement.prototype, 'readyState', { value: 4, configurable: true })
    Object.defineProperty(HTMLVideoElement.prototype, 'srcObject', { value: null, writable: true, configurable: true })
    const scan = await mountSuspended(SwapScan)
    await soon(() => expect(scan.text()).toBe('Scan the label'))
    await scan.get('button').trigger('click')
    await soon(() => expect(scan.emitted('found')).toEqual([['LID-02.Z']]))
    expect(stopped).toHaveBeenCalledOnce()
  })

  it('says what to do where the browser cannot', async () => {
    const scan = await mountSuspended(SwapScan)
    await soon(() => expect(scan.text()).toContain('type three characters of the tag'))
    expect(scan.find('button').exists()).toBe(false)
  })

  it('says what to do where the camera is refused', async () => {
    vi.stubGlobal('BarcodeDetector', Object.assign(function Detector() {}, { getSupportedFormats: async () => ['qr_code'] }))
    vi.stubGlobal('navigator', Object.assign(Object.create(navigator) as Navigator, { mediaDevices: { getUserMedia: async () => { throw new DOMException('no', 'NotAllowedError') } } }))
    const scan = await mountSuspended(SwapScan)
    await soon(() => expect(scan.text()).toBe('Scan the label'))
    await scan.get('button').trigger('click')
    await soon(() => expect(scan.text()).toContain('The camera is closed to this page. Type three characters'))
  })
})

describe('a choice for a thumb', () => {
  it('belongs to its question and hands on what is chosen', async () => {
    const choices = await mountSuspended(BaseChoices, { props: { legend: 'Blocked how?', options: [{ value: 'pin', label: 'pin', hint: 'through the guide' }, { value: 'prop', label: 'prop' }] } })
    expect(choices.get('legend').text()).toBe('Blocked how?')
    await choices.findAll('input')[1]?.setValue()
    expect(choices.emitted('update:modelValue')).toEqual([['prop']])
  })
})
