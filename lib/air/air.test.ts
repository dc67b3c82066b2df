import fc from 'fast-check'
import psychrolib from 'psychrolib'
import { beforeAll, describe, expect, it } from 'vitest'
import { referenceRows } from '@/tests/support/reference'
import { dewPointC } from './dew-point'
import { enthalpyKjKg } from './enthalpy'
import {
  absoluteHumidityGM3,
  humidityAfterTemperatureChangePct,
  humidityRatio,
  STANDARD_PRESSURE_PA,
  vapourPressurePa,
} from './humidity'
import { saturationPressureForChartsPa, saturationPressurePa } from './saturation'
import { wetBulbC } from './wet-bulb'

beforeAll(() => {
  psychrolib.SetUnitSystem(psychrolib.SI)
})

function dewPointOrThrowC(vapourPa: number): number {
  const dewPoint = dewPointC(vapourPa)
  if (!dewPoint.ok) throw new Error('this air has no dew point')
  return dewPoint.value
}

describe('air, against computed check values (psychrometrics_check.csv, last printed digit)', () => {
  it.each(
    referenceRows('psychrometrics_check.csv').map(
      (row) => [row.number('temp_c'), row.number('rh_pct'), row] as const,
    ),
  )('%d °C and %d % RH', (temperatureC, humidityPct, row) => {
    const vapourPa = vapourPressurePa(temperatureC, humidityPct)
    const ratio = humidityRatio(vapourPa)
    expect(Math.abs(saturationPressurePa(temperatureC) - row.number('pws_pa'))).toBeLessThan(0.006)
    expect(Math.abs(vapourPa - row.number('pw_pa'))).toBeLessThan(0.006)
    expect(Math.abs(dewPointOrThrowC(vapourPa) - row.number('dew_point_c'))).toBeLessThan(0.001)
    expect(Math.abs(ratio - row.number('humidity_ratio_kg_kg'))).toBeLessThan(6e-7)
    expect(
      Math.abs(absoluteHumidityGM3(temperatureC, vapourPa) - row.number('abs_humidity_g_m3')),
    ).toBeLessThan(6e-4)
    expect(Math.abs(wetBulbC(temperatureC, humidityPct) - row.number('wet_bulb_c'))).toBeLessThan(0.001)
    expect(Math.abs(enthalpyKjKg(temperatureC, ratio) - row.number('enthalpy_kj_kg_da'))).toBeLessThan(6e-4)
  })
})

describe('air, against the printed points of ASHRAE Fundamentals (2017), ch. 1, Tables 2 and 3', () => {
  // Nothing here works out a volume of air, so the one printed volume has nothing to be compared with.
  const points = referenceRows('ashrae_published_points.csv').filter(
    (row) => row.text('quantity') !== 'dry_air_volume_m3_kg',
  )
  const relativeError = (found: number, printed: number): number => Math.abs(found - printed) / printed

  it.each(points.map((row) => [row.text('quantity'), row.number('temp_c'), row.number('value')] as const))(
    '%s at %d °C',
    (quantity, temperatureC, printed) => {
      const saturated = humidityRatio(saturationPressurePa(temperatureC))
      switch (quantity) {
        case 'saturation_vapour_pressure_pa':
          return expect(relativeError(saturationPressurePa(temperatureC), printed)).toBeLessThan(0.0003)
        case 'saturation_humidity_ratio_kg_kg':
          // The table counts the real gas, the equation an ideal one: 0.5 %, growing to 0.7 % at 50 °C.
          return expect(relativeError(saturated, printed)).toBeLessThan(temperatureC < 50 ? 0.005 : 0.007)
        case 'saturated_air_enthalpy_j_kg':
          return expect(relativeError(1000 * enthalpyKjKg(temperatureC, saturated), printed)).toBeLessThan(
            0.01,
          )
        case 'dry_air_enthalpy_j_kg':
          return expect(relativeError(1000 * enthalpyKjKg(temperatureC, 0), printed)).toBeLessThan(0.01)
        default:
          throw new Error(`no check for ${quantity}`)
      }
    },
  )
})

describe('air, against psychrolib over the whole range', () => {
  const air = [
    fc.double({ min: -10, max: 50, noNaN: true }),
    fc.double({ min: 0.5, max: 100, noNaN: true }),
  ] as const

  it('agrees on saturation, vapour pressure, humidity ratio and enthalpy', () => {
    fc.assert(
      fc.property(...air, (temperatureC, humidityPct) => {
        const h = humidityPct / 100
        const vapourPa = vapourPressurePa(temperatureC, humidityPct)
        const ratio = humidityRatio(vapourPa)
        expect(saturationPressurePa(temperatureC)).toBeCloseTo(psychrolib.GetSatVapPres(temperatureC), 6)
        expect(vapourPa).toBeCloseTo(psychrolib.GetVapPresFromRelHum(temperatureC, h), 6)
        expect(ratio).toBeCloseTo(psychrolib.GetHumRatioFromRelHum(temperatureC, h, STANDARD_PRESSURE_PA), 8)
        expect(1000 * enthalpyKjKg(temperatureC, ratio)).toBeCloseTo(
          psychrolib.GetMoistAirEnthalpy(temperatureC, ratio),
          4,
        )
      }),
    )
  })

  it('agrees on dew point and wet bulb', () => {
    fc.assert(
      fc.property(...air, (temperatureC, humidityPct) => {
        const h = humidityPct / 100
        const dewPoint = dewPointOrThrowC(vapourPressurePa(temperatureC, humidityPct))
        expect(Math.abs(dewPoint - psychrolib.GetTDewPointFromRelHum(temperatureC, h))).toBeLessThan(0.002)
        const wetBulb = psychrolib.GetTWetBulbFromRelHum(temperatureC, h, STANDARD_PRESSURE_PA)
        expect(Math.abs(wetBulbC(temperatureC, humidityPct) - wetBulb)).toBeLessThan(0.002)
      }),
    )
  })
})

describe('air, properties', () => {
  it('saturation pressure rises with temperature, over ice and over water', () => {
    for (const over of ['ice-below-zero', 'water'] as const) {
      const pressures = Array.from({ length: 7001 }, (_, n) => saturationPressurePa(-60 + n * 0.02, over))
      expect(pressures.filter((pressure, n) => n > 0 && pressure <= (pressures[n - 1] ?? 0))).toEqual([])
    }
  })

  it('saturation pressure does not jump where ice turns to water', () => {
    const ice = saturationPressurePa(0.01)
    const water = saturationPressurePa(0.01, 'water')
    expect(Math.abs(ice - water) / water).toBeLessThan(1e-4)
  })

  it('lies 5 % higher over water than over ice at -5 °C, 10 % at -10 °C', () => {
    expect(saturationPressurePa(-5, 'water') / saturationPressurePa(-5)).toBeCloseTo(1.05, 2)
    expect(saturationPressurePa(-10, 'water') / saturationPressurePa(-10)).toBeCloseTo(1.1, 2)
  })

  it('the chart form stays within 0.3 % between 0 and 50 °C', () => {
    for (let temperatureC = 0.02; temperatureC <= 50; temperatureC += 0.5) {
      const error = saturationPressureForChartsPa(temperatureC) / saturationPressurePa(temperatureC) - 1
      expect(error).toBeGreaterThan(-0.003)
      expect(error).toBeLessThan(0.0002)
    }
  })

  it('the dew point is never above the air, and equals it when saturated', () => {
    for (const temperatureC of [-10, -3, 0.005, 4, 20, 50]) {
      expect(dewPointOrThrowC(vapourPressurePa(temperatureC, 60))).toBeLessThan(temperatureC)
      expect(dewPointOrThrowC(vapourPressurePa(temperatureC, 100))).toBeCloseTo(temperatureC, 6)
    }
  })

  it('air without water has no dew point but a wet bulb', () => {
    expect(dewPointC(0)).toEqual({ ok: false, error: { code: 'too-dry' } })
    expect(wetBulbC(20, 0)).toBeGreaterThan(4)
    expect(wetBulbC(20, 0)).toBeLessThan(wetBulbC(20, 0.5))
  })

  it('warming there and back gives the same humidity', () => {
    const degree = fc.double({ min: -10, max: 50, noNaN: true })
    fc.assert(
      fc.property(degree, degree, fc.double({ min: 0, max: 100, noNaN: true }), (fromC, toC, humidityPct) => {
        const there = humidityAfterTemperatureChangePct(humidityPct, fromC, toC)
        fc.pre(there <= 100)
        expect(humidityAfterTemperatureChangePct(there, toC, fromC)).toBeCloseTo(humidityPct, 8)
      }),
    )
  })

  it('cooling below the dew point gives over 100 %, not a clipped figure', () => {
    expect(humidityAfterTemperatureChangePct(80, 20, 10)).toBeGreaterThan(150)
  })

  it('names the input that is not a number', () => {
    expect(() => saturationPressurePa(NaN)).toThrow(/temperatureC/)
    expect(() => vapourPressurePa(20, NaN)).toThrow(/humidityPct/)
    expect(() => humidityAfterTemperatureChangePct(50, NaN, 20)).toThrow(/fromC/)
    expect(() => humidityAfterTemperatureChangePct(50, 20, 61)).toThrow(/toC/)
    expect(() => wetBulbC(20, 101)).toThrow(/humidityPct/)
    expect(() => dewPointC(NaN)).toThrow(/vapourPa/)
    expect(() => humidityRatio(101_325)).toThrow(/vapourPa/)
    expect(() => enthalpyKjKg(20, NaN)).toThrow(/ratio/)
    expect(() => absoluteHumidityGM3(NaN, 1000)).toThrow(/temperatureC/)
  })
})
