import { describe, expect, it } from 'vitest'
import { workedExamples } from './examples'

const linesOf = (id: string): string[] => {
  const example = workedExamples().find((one) => one.id === id)
  if (example === undefined) throw new Error(`no example ${id}`)
  return example.lines.map(({ what, value }) => `${what}: ${value}`.replaceAll('\u00a0', ' '))
}

/** The figures come from `lib`; here they are held against what was worked out apart from it, to the digits shown. */
describe('worked examples', () => {
  it.each([
    ['emc', ['Wood ends at: 9.2711 % MC', 'Air at 20 °C that holds wood at 9 % MC: 48.30 % RH']],
    [
      'air',
      [
        'As it is: 18.41 % MC',
        'Dew point, all the way: 5.64 °C',
        'Warmed to 12 °C: 65.02 % RH, 12.23 % MC',
        'Warmed to 15 °C: 53.47 % RH, 9.96 % MC',
        'Warmed to 18 °C: 44.18 % RH, 8.40 % MC',
        'Warmed to 20 °C: 38.99 % RH, 7.57 % MC',
      ],
    ],
    ['movement', ['From the whole shrinkage: 0.8540 mm', 'By the coefficient 0.00353: 0.8472 mm']],
    [
      'fit',
      [
        'Least clearance, turned 30°: −0.0256 mm by the short form, −0.0239 mm from the ovals',
        'Change it stands at any angle: 1.77 points of % MC',
      ],
    ],
    [
      'following',
      [
        'Ring, both faces and its rim open: 0.1847 after 1 h, 0.3468 after 3 h, 0.5628 after 8 h, 0.7109 after 14 h',
      ],
    ],
    ['weighing', ['Heading for: 149.93 g', 'Time constant: 12.08 days']],
    [
      'shop',
      [
        'Warm it to: 16.74 °C, where it has 47.83 % RH',
        'Or dry it where it is to: 47.01 % RH',
        'Water to take out of its air, once: 0.1256 kg',
        'Heat for its air, 10 K warmer than outside at one air change an hour: 134 W',
      ],
    ],
    ['salts', ['NaCl: 75.48 ± 0.14 % RH']],
    ['doubt', ['EMC at 20 °C and 50 % RH: ± 0.48 % MC', 'EMC at 8 °C and 85 % RH: ± 1.33 % MC']],
  ] as const)('%s', (id, expected) => {
    expect(linesOf(id)).toEqual(expect.arrayContaining([...expected]))
  })

  it('gives an early edge before the middle, later the better the cover', () => {
    const minutes = linesOf('time-out').map((line) => /within about (?:(\d+) h ?)?(?:(\d+) min)?/.exec(line))
    const early = minutes.map((match) => 60 * Number(match?.[1] ?? 0) + Number(match?.[2] ?? 0))
    expect(early).toHaveLength(3)
    expect(early[0]).toBeGreaterThan(60)
    expect(early[0]).toBeLessThan(early[1] ?? 0)
    expect(early[1]).toBeLessThan(early[2] ?? 0)
  })

  it('has a name of its own for each', () => {
    const ids = workedExamples().map(({ id }) => id)
    expect(new Set(ids).size).toBe(ids.length)
  })
})
