import { describe, expect, it } from 'vitest'
import { startOptions } from './start-options'

describe('what stands behind npm start --', () => {
  it('is nothing, a demo made anew, or a scenario', () => {
    expect(startOptions([])).toEqual({ resetDemo: false, scenario: undefined })
    expect(startOptions(['--reset-demo']).resetDemo).toBe(true)
    expect(startOptions(['--scenario', 'mould-risk']).scenario).toBe('mould-risk')
    expect(startOptions(['--scenario=lock-up']).scenario).toBe('lock-up')
  })

  it('names what there is when something else is asked', () => {
    expect(() => startOptions(['--scenario', 'flood'])).toThrow(/no scenario "flood".*lock-up/s)
    expect(() => startOptions(['--scenario'])).toThrow('--scenario needs a name.')
    expect(() => startOptions(['--fast'])).toThrow('"--fast" is not an option. There are two')
    expect(() => startOptions(['lock-up'])).toThrow('"lock-up" is not an option.')
  })
})
