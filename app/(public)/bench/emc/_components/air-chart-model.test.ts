import { describe, expect, it } from 'vitest'
import { emcPct } from '@/lib/wood/emc'
import { lineOfEmc, lineOfSameAir, LINES_PCT, temperatureDomain, temperatureTicks } from './air-chart-model'

describe('the chart of the air', () => {
  it('draws every line where wood ends at its moisture content', () => {
    for (const line of LINES_PCT) {
      const points = lineOfEmc(line, [-10, 50])
      expect(points.length).toBe(25)
      for (const { temperatureC, humidityPct } of points)
        expect(emcPct(temperatureC, humidityPct)).toBeCloseTo(line, 4)
    }
  })

  it('passes the same air through its own point, and ends where it condenses', () => {
    const points = lineOfSameAir({ temperatureC: 8, humidityPct: 85 }, [0, 35])
    expect(points).toContainEqual({ temperatureC: 8, humidityPct: 85 })
    const [first] = points
    expect(first?.humidityPct).toBeGreaterThan(100)
    expect(first?.humidityPct).toBeLessThan(120)
    // Its dew point is 5.6 °C.
    expect(first?.temperatureC).toBeLessThan(5.6)
    expect(points.at(-1)?.humidityPct).toBeLessThan(20)
  })

  it('keeps the usual temperatures in sight, and widens for others', () => {
    expect(temperatureDomain([8, 15])).toEqual([0, 35])
    expect(temperatureDomain([-7, 42])).toEqual([-10, 45])
  })

  it('writes round figures of either unit', () => {
    expect(temperatureTicks([-10, 35], 'metric', false).map((tick) => tick.text)).toEqual([
      '−10',
      '−5',
      '0',
      '5',
      '10',
      '15',
      '20',
      '25',
      '30',
      '35',
    ])
    const fahrenheit = temperatureTicks([0, 35], 'imperial', true)
    expect(fahrenheit.map((tick) => tick.text)).toEqual(['40', '60', '80'])
    expect(fahrenheit[1]?.temperatureC).toBeCloseTo(15.56, 2)
  })
})
