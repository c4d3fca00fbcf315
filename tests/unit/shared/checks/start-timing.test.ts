import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { startTiming } from '../../../../shared/checks/start-timing'
import { judgeInput, linear, plate, rotary, told } from '../../../support/check-input'

const timing = (selectSettleTime?: number, startPulseTime?: number, inputFilterTime?: number, controllerScan?: number) =>
  judgeInput(linear({ selectInputs: 3, selectSettleTime, startPulseTime }), {
    nameplate: plate({ inputFilterTime }), axis: { axisKind: 'linear', flags: [], ...controllerScan === undefined ? {} : { controllerScan } },
  })

// 4 ms: common practice, no source.
describe('start-timing', () => {
  it('is silent for 6 and 8 ms behind a filter of 2 ms', () => {
    expect(told(startTiming, timing(6, 8, 2))).toEqual([])
  })

  it('warns below the input filter: 5 − 4.5 = 0.5 ms too short', () => {
    const input = timing(4.5, 8, 5)
    expect(told(startTiming, input)).toEqual(['warn: The settle time of the select inputs of 4.5 ms is 0.5 ms shorter than the input filter of 5 ms.'])
    expect(startTiming.judge(input)).toMatchObject([{ at: ['/setup/selectSettleTime'], values: { value: 4.5, least: 5, filter: 5 } }])
  })

  it('adds the scan of the controller where it is known: 2 + 10 = 12 ms, 12 − 8 = 4 ms', () => {
    expect(told(startTiming, timing(12, 8, 2, 10))).toEqual(['warn: The start pulse of 8 ms is 4 ms shorter than input filter and controller scan, 2 ms + 10 ms = 12 ms.'])
    expect(told(startTiming, timing(12, 12, 2, 10))).toEqual([])
  })

  it('warns below 4 ms, and lets 4 ms and the filter itself pass', () => {
    expect(told(startTiming, timing(4, 4, 4))).toEqual([])
    expect(told(startTiming, timing(3.999, 4, 2))).toEqual(['warn: The settle time of the select inputs of 3.999 ms is below the 4 ms that inputs need in practice.'])
  })

  it('names what is missing, and still judges by practice', () => {
    expect(told(startTiming, timing(6, 3))).toEqual([
      'warn: The start pulse of 3 ms is below the 4 ms that inputs need in practice.',
      'unknown: The timing of the start cannot be judged without nameplate.inputFilterTime.',
    ])
    expect(startTiming.judge(timing(6, undefined, 2))[0]!.missing).toEqual(['startPulseTime'])
  })

  it('does not apply without select inputs and times', () => {
    expect(told(startTiming, judgeInput(linear()))).toEqual(['not applicable'])
    expect(told(startTiming, judgeInput(rotary({ selectInputs: 0 })))).toEqual(['not applicable'])
    expect(told(startTiming, judgeInput(linear({ startPulseTime: 1 })))[0]).toMatch(/^warn: The start pulse of 1 ms is below/)
  })

  it('warns just where a time is below filter and scan together, or below 4 ms', () => {
    const tenths = fc.integer({ min: 0, max: 200 }).map(n => n / 10)
    fc.assert(fc.property(tenths, tenths, tenths, tenths, (settle, pulse, filter, scan) => {
      const short = (value: number) => Number(Math.floor(value * 10 + 0.5) < Math.floor(filter * 10 + 0.5) + Math.floor(scan * 10 + 0.5) || value < 4)
      expect(startTiming.judge(timing(settle, pulse, filter, scan))).toHaveLength(short(settle) + short(pulse))
    }))
  })
})
