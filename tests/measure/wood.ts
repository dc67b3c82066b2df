import { carryCheck } from '@/lib/carry/check'
import { woodOfPiece } from '@/lib/carry/joint-defaults'
import { judgeInput } from '@/lib/carry/judge'
import { copyState, evenState, stateOfStored, stepWood, storedOf } from '@/lib/follow/wood-state'
import { emcPct } from '@/lib/wood/emc'
import { SPECIES } from '@/lib/wood/species'
import { airAt, box, carry, HOUR_MS, NOW } from '../support/carry'
import { figures, type Line, quickest } from './timing'

const EMC_VALUES = 200_000
const PIECES = 1000
const HOURS = 8760
const CHECKED = 30

/** Two loops of their own: one shared loop would learn the first function and be slow with the second. */
function emcLine(): Line {
  const temperatures = Float64Array.from({ length: EMC_VALUES }, (_, n) => (n % 400) / 10)
  const humidities = Float64Array.from({ length: EMC_VALUES }, (_, n) => 5 + (n % 900) / 10)
  const bare = quickest(25, () => {
    let sum = 0
    for (let n = 0; n < EMC_VALUES; n += 1) {
      // The equation as one would write it down in a loop: no ranges, no names.
      const t = temperatures[n] ?? 0
      const w = 349 + 1.29 * t + 0.0135 * t * t
      const k = 0.805 + 0.000736 * t - 0.00000273 * t * t
      const k1 = 6.27 - 0.00938 * t - 0.000303 * t * t
      const k2 = 1.91 + 0.0407 * t - 0.000293 * t * t
      const x = (k * (humidities[n] ?? 0)) / 100
      sum += (1800 / w) * (x / (1 - x) + (k1 * x + 2 * k1 * k2 * x * x) / (1 + k1 * x + k1 * k2 * x * x))
    }
    return sum
  })
  const own = quickest(25, () => {
    let sum = 0
    for (let n = 0; n < EMC_VALUES; n += 1) sum += emcPct(temperatures[n] ?? 0, humidities[n] ?? 0)
    return sum
  })
  return {
    what: 'EMC values a second, against a bare inlined loop',
    figure: `${figures(EMC_VALUES / own.ms / 1000)} million/s`,
    ratio: figures(bare.ms / own.ms),
    aim: '≥ 0.9',
  }
}

/** Boxes of many woods and sizes, ring and lid each. */
const filters = Array.from({ length: PIECES }, (_, n) => {
  const wood = SPECIES[n % SPECIES.length]
  return woodOfPiece({
    ...box,
    lidForm: n % 3 === 0 ? 'hollow' : 'plug',
    wood: wood?.slug ?? null,
    wallMm: 2 + (n % 7) / 2,
    spigotMm: 4 + (n % 5),
  }).filter
})

const year = Array.from({ length: HOURS }, (_, hour) => ({
  hours: 1,
  emcPct: 10 + 3 * Math.sin(hour / 1394) + Math.sin(hour / 3.8),
  temperatureC: 12 + 8 * Math.sin(hour / 1394),
  cover: 'closed' as const,
  isKnown: true,
}))

/** As many exponentials as following needs at least, and nothing else: three for each piece and hour. */
function bareExponentials(hours: number): () => number {
  return () => {
    let sum = 0
    for (let n = 0; n < 3 * PIECES * hours; n += 1) sum += Math.exp(-1e-7 * n)
    return sum
  }
}

function yearLine(): Line {
  const bare = quickest(3, bareExponentials(HOURS))
  const own = quickest(3, () => {
    let sum = 0
    for (const filter of filters) {
      const state = evenState(filter, 10, 'closed')
      for (const hour of year) stepWood(filter, state, hour)
      sum += state.ringPct
    }
    return sum
  })
  return {
    what: '1,000 pieces (ring and lid) carried through a year of hours',
    figure: `${figures(own.ms)} ms`,
    ratio: `${figures(own.ms / bare.ms)} × its exponentials alone`,
    aim: '< 1,000 ms on one core',
  }
}

function hourLine(): Line {
  const stored = filters.map((filter) => JSON.stringify(storedOf(evenState(filter, 10, 'closed'))))
  const bare = quickest(9, () =>
    stored.reduce((sum, text) => sum + JSON.stringify(JSON.parse(text)).length, 0),
  )
  const own = quickest(9, () => {
    let sum = 0
    filters.forEach((filter, n) => {
      const state = stateOfStored(filter, JSON.parse(stored[n] ?? '{}'))
      if (state === undefined) return
      stepWood(filter, state, { hours: 1, emcPct: 11, temperatureC: 15, cover: 'closed', isKnown: true })
      sum += JSON.stringify(storedOf(state)).length
    })
    return sum
  })
  return {
    what: '1,000 pieces brought up by an hour, from stored to stored',
    figure: `${figures(own.ms)} ms`,
    ratio: `${figures(own.ms / bare.ms)} × reading and writing their text alone`,
    aim: 'none',
  }
}

function checkLine(): Line {
  const forecast = Array.from({ length: 72 }, (_, n) => ({
    at: NOW + n * HOUR_MS,
    emcPct: 13.6 + Math.sin(n / 4),
    temperatureC: 8,
  }))
  const inputs = Array.from({ length: CHECKED }, (_, n) =>
    carry({ there: airAt(13.6), forecast, airDoubtPct: 1 }, { jointDiameterMm: 30 + 2 * n, lidForm: 'plug' }),
  )
  const steps = quickest(9, () =>
    inputs.reduce((sum, { piece, start, airs }) => {
      if (start === null) return sum
      const { filter } = woodOfPiece(piece)
      const state = copyState(start)
      for (const air of airs) stepWood(filter, state, { ...air, hours: 1 })
      return sum + state.ringPct
    }, 0),
  )
  const own = quickest(9, () =>
    inputs.reduce((sum, input) => {
      const check = carryCheck(input)
      return sum + (check.kind === 'verdict' ? check.usedAtEnd : 0)
    }, 0),
  )
  return {
    what: 'a carry check of 30 pieces, doubt and curve with it',
    figure: `${figures(own.ms)} ms`,
    ratio: `${figures(own.ms / steps.ms)} × stepping them through 72 h once`,
    aim: '< 20 ms',
  }
}

/** The whole answer before a carry: the better covers, what the time hangs on, the way home. */
function thereAndBackLine(): Line {
  const hours = Array.from({ length: 72 }, (_, n) => NOW + n * HOUR_MS)
  const forecast = hours.map((at, n) => ({ at, emcPct: 13.6 + Math.sin(n / 4), temperatureC: 8 }))
  const home = hours.map((at, n) => ({
    at,
    emcPct: 8.5 + 0.2 * Math.sin(n / 4),
    temperatureC: 19,
    cover: 'open' as const,
    isKnown: true,
  }))
  const inputs = Array.from({ length: CHECKED }, (_, n) => ({
    ...carry(
      { there: airAt(13.6), forecast, airDoubtPct: 1 },
      { jointDiameterMm: 30 + 2 * n, lidForm: 'plug' },
    ),
    home,
  }))
  const alone = quickest(9, () => inputs.reduce((sum, input) => sum + verdictsOf(carryCheck(input)), 0))
  const own = quickest(9, () => inputs.reduce((sum, input) => sum + verdictsOf(judgeInput(input).check), 0))
  return {
    what: 'the same 30 pieces there and back, with the better covers and what each hangs on',
    figure: `${figures(own.ms)} ms`,
    ratio: `${figures(own.ms / alone.ms)} × the check alone`,
    aim: '< 30 ms',
  }
}

const verdictsOf = ({ kind }: { kind: string }): number => (kind === 'verdict' ? 1 : 0)

export const woodLines = (): Line[] => [emcLine(), yearLine(), hourLine(), checkLine(), thereAndBackLine()]
