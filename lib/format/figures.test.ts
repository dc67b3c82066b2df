import { describe, expect, it } from 'vitest'
import {
  formatCount,
  formatEmc,
  formatFineLength,
  formatHumidity,
  formatLength,
  formatMass,
  formatPoints,
  formatTemperature,
  formatUsed,
} from './figures'

const plain = (text: string) => text.replaceAll('\u00a0', ' ')

describe('figures as a reader sees them', () => {
  it('names what a percentage is of, always', () => {
    expect(plain(formatEmc(8.46))).toBe('8.5 % MC')
    expect(plain(formatHumidity(70.6))).toBe('71 % RH')
  })

  it('keeps a figure and its unit on one line', () => {
    expect(formatEmc(8.46)).not.toContain(' ')
    expect(formatTemperature(3)).not.toContain(' ')
  })

  it('tells points of moisture without a sign and in the singular for one', () => {
    expect(plain(formatPoints(-5.12))).toBe('5.1 points')
    expect(plain(formatPoints(0.98))).toBe('1.0 point')
  })

  it('tells temperature in the units asked for, with a true minus', () => {
    expect(plain(formatTemperature(8.24))).toBe('8.2 °C')
    expect(plain(formatTemperature(-3.5))).toBe('−3.5 °C')
    expect(plain(formatTemperature(-0.04))).toBe('0.0 °C')
    expect(plain(formatTemperature(20, 'imperial'))).toBe('68 °F')
  })

  it('tells lengths, fine lengths and masses in both systems', () => {
    expect(plain(formatLength(62))).toBe('62 mm')
    expect(plain(formatLength(2.5))).toBe('2.5 mm')
    expect(plain(formatLength(25.4, 'imperial'))).toBe('1.00 in')
    expect(plain(formatFineLength(0.163))).toBe('0.15 mm')
    expect(plain(formatFineLength(0.163, 'imperial'))).toBe('0.006 in')
    expect(plain(formatMass(84.46))).toBe('84.5 g')
    expect(plain(formatMass(28.349523125, 'imperial'))).toBe('1.00 oz')
  })

  it('tells a share used in words a maker would use, and owns up past the end', () => {
    expect(formatUsed(0.02)).toBe('hardly any used')
    expect(formatUsed(0.24)).toBe('a quarter used')
    expect(formatUsed(0.5)).toBe('half used')
    expect(formatUsed(1)).toBe('all used')
    expect(formatUsed(1.4)).toBe('more than all used')
  })

  it('counts in the singular and the plural', () => {
    expect(formatCount(1, 'box', 'boxes')).toBe('1 box')
    expect(formatCount(3, 'box', 'boxes')).toBe('3 boxes')
  })
})
