import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { humidityAfterTemperatureChangePct } from '@/lib/air/humidity'
import { referenceJson, referenceRows } from '@/tests/support/reference'
import { emcEquationPct } from './emc-equation'
import { emcDoubtPct, emcFlags, emcOfReadingPct, emcPct, emcSlope, humidityForEmcPct } from './emc'

const temperature = fc.double({ min: -10, max: 50, noNaN: true })
const humidity = fc.double({ min: 0, max: 100, noNaN: true })

function humidityOrThrowPct(temperatureC: number, wantedPct: number): number {
  const humidityPct = humidityForEmcPct(temperatureC, wantedPct)
  if (!humidityPct.ok) throw new Error('above saturation')
  return humidityPct.value
}

describe('EMC, against print', () => {
  it.each(
    referenceRows('emc_table_4_2.csv').map(
      (row) => [row.number('temp_f'), row.number('rh_pct'), row.number('emc_pct')] as const,
    ),
  )(
    'Wood Handbook Table 4-2: %d °F and %d % RH give %d % MC, to 0.06',
    (temperatureF, humidityPct, printedPct) => {
      expect(Math.abs(emcEquationPct(((temperatureF - 32) * 5) / 9, humidityPct) - printedPct)).toBeLessThan(
        0.06,
      )
    },
  )

  it('the figure for 0 °C, used below freezing, still fits the printed row for 30 °F', () => {
    const cold = referenceRows('emc_table_4_2.csv').filter((row) => row.number('temp_f') === 30)
    expect(cold.length).toBeGreaterThan(5)
    for (const row of cold) {
      expect(Math.abs(emcPct(-1.1, row.number('rh_pct')) - row.number('emc_pct'))).toBeLessThan(0.1)
    }
  })

  it('European ash measured 7.3 % at 20 °C and 37 % RH (merchant data sheet)', () => {
    expect(emcPct(20, 37)).toBeCloseTo(7.27, 2)
  })
})

describe('EMC, against computed values', () => {
  it.each(
    referenceRows('emc_equation_values.csv').map(
      (row) => [row.number('temp_c'), row.number('rh_pct'), row] as const,
    ),
  )('%d °C and %d % RH, value and slope to 0.0005', (temperatureC, humidityPct, row) => {
    expect(Math.abs(emcPct(temperatureC, humidityPct) - row.number('emc_pct'))).toBeLessThan(0.0005)
    expect(Math.abs(emcSlope(temperatureC, humidityPct) - row.number('demc_drh'))).toBeLessThan(0.0005)
  })

  it.each(
    referenceRows('rh_for_emc.csv').map(
      (row) => [row.number('temp_c'), row.number('emc_pct'), row.number('rh_pct')] as const,
    ),
  )('at %d °C, %d % MC is held at %d % RH, to 0.005', (temperatureC, wantedPct, humidityPct) => {
    expect(Math.abs(humidityOrThrowPct(temperatureC, wantedPct) - humidityPct)).toBeLessThan(0.005)
  })

  const worked = z
    .object({
      warming: z.array(
        z.object({
          from_c: z.number(),
          from_rh: z.number(),
          to_c: z.number(),
          rh_pct: z.number(),
          emc_pct: z.number(),
        }),
      ),
      sensor: z.array(
        z.object({ temp_c: z.number(), rh_pct: z.number(), u_rh: z.number(), u_emc: z.number() }),
      ),
    })
    .parse(referenceJson('worked_examples.json'))

  it.each(worked.warming)('warming $from_c °C, $from_rh % RH to $to_c °C', (example) => {
    const humidityPct = humidityAfterTemperatureChangePct(example.from_rh, example.from_c, example.to_c)
    expect(Math.abs(humidityPct - example.rh_pct)).toBeLessThan(0.02)
    expect(Math.abs(emcPct(example.to_c, humidityPct) - example.emc_pct)).toBeLessThan(0.005)
  })

  it.each(worked.sensor)('a sensor ±$u_rh % RH at $temp_c °C, $rh_pct % RH', (example) => {
    const doubtPct = emcDoubtPct(example.temp_c, example.rh_pct, example.u_rh, 0)
    expect(Math.abs(doubtPct - example.u_emc)).toBeLessThan(0.001)
  })
})

describe('EMC, properties', () => {
  it('rises with humidity and stays between 0 and 30', () => {
    fc.assert(
      fc.property(temperature, humidity, humidity, (temperatureC, one, other) => {
        fc.pre(Math.abs(one - other) > 1e-6)
        const [low, high] = [Math.min(one, other), Math.max(one, other)]
        expect(emcPct(temperatureC, low)).toBeLessThan(emcPct(temperatureC, high))
        expect(emcPct(temperatureC, low)).toBeGreaterThanOrEqual(0)
        expect(emcPct(temperatureC, high)).toBeLessThanOrEqual(30)
      }),
    )
  })

  it('goes back to the humidity it came from', () => {
    fc.assert(
      fc.property(temperature, humidity, (temperatureC, humidityPct) => {
        const wantedPct = emcPct(temperatureC, humidityPct)
        expect(Math.abs(humidityOrThrowPct(temperatureC, wantedPct) - humidityPct)).toBeLessThan(1e-6)
      }),
    )
  })

  it('does not jump, not at freezing either', () => {
    fc.assert(
      fc.property(temperature, humidity, (temperatureC, humidityPct) => {
        const nearC = Math.min(50, temperatureC + 0.01)
        const nearPct = Math.min(100, humidityPct + 0.01)
        expect(Math.abs(emcPct(nearC, humidityPct) - emcPct(temperatureC, humidityPct))).toBeLessThan(0.002)
        expect(emcPct(temperatureC, nearPct) - emcPct(temperatureC, humidityPct)).toBeLessThan(0.02)
      }),
    )
    expect(emcPct(-0.001, 60)).toBe(emcPct(0, 60))
    expect(emcPct(0.001, 60)).toBeCloseTo(emcPct(0, 60), 4)
  })

  it('the slope is the rise over a small step', () => {
    fc.assert(
      fc.property(
        temperature,
        fc.double({ min: 0.01, max: 99.99, noNaN: true }),
        (temperatureC, humidityPct) => {
          const rise = emcPct(temperatureC, humidityPct + 0.005) - emcPct(temperatureC, humidityPct - 0.005)
          expect(Math.abs(emcSlope(temperatureC, humidityPct) - rise / 0.01)).toBeLessThan(1e-5)
        },
      ),
    )
  })

  it('a better sensor is never doubted more', () => {
    fc.assert(
      fc.property(temperature, humidity, (temperatureC, humidityPct) => {
        const coarse = emcDoubtPct(temperatureC, humidityPct, 3, 0.3)
        expect(emcDoubtPct(temperatureC, humidityPct, 2, 0.3)).toBeLessThan(coarse)
        expect(emcDoubtPct(temperatureC, humidityPct, 3, 0)).toBeLessThanOrEqual(coarse)
      }),
    )
  })

  it('finds no air for wood wetter than saturated air can hold', () => {
    const found = humidityForEmcPct(20, 29.5)
    expect(found).toEqual({ ok: false, error: { code: 'above-saturation', emcMaxPct: emcPct(20, 100) } })
  })
})

describe('EMC, at the edges of its range', () => {
  it('flags what is extrapolated', () => {
    expect(emcFlags(20, 50)).toEqual([])
    expect(emcFlags(0, 5)).toEqual([])
    expect(emcFlags(0, 95)).toEqual([])
    expect(emcFlags(-0.1, 4.9)).toEqual(['below-zero', 'below-5-rh'])
    expect(emcFlags(20, 95.1)).toEqual(['above-95-rh'])
  })

  it('refuses air it does not know, naming the input', () => {
    expect(() => emcPct(NaN, 50)).toThrow(/temperatureC/)
    expect(() => emcPct(20, NaN)).toThrow(/humidityPct/)
    expect(() => emcPct(-10.1, 50)).toThrow(/temperatureC/)
    expect(() => emcPct(50.1, 50)).toThrow(/temperatureC/)
    expect(() => emcSlope(20, 101)).toThrow(/humidityPct/)
    expect(() => emcDoubtPct(20, 50, NaN)).toThrow(/humidityDoubtPct/)
    expect(() => humidityForEmcPct(20, NaN)).toThrow(/emcPct/)
    expect(() => emcOfReadingPct(20, NaN)).toThrow(/humidityPct/)
  })

  it('has an EMC for every stored reading, at the nearer end of the range', () => {
    expect(emcOfReadingPct(20, 50)).toBe(emcPct(20, 50))
    expect(emcOfReadingPct(-25, 104)).toBe(emcPct(0, 100))
    expect(emcOfReadingPct(70, -3)).toBe(emcPct(50, 0))
  })
})
