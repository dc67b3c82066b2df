import { dewPointC } from '@/lib/air/dew-point'
import { humidityAfterTemperatureChangePct, vapourPressurePa } from '@/lib/air/humidity'
import { saltFixedPoints } from '@/lib/air/salts'
import { timeOutAnswer } from '@/lib/bench/time-out'
import { weighingAnswer, weighingQuerySchema } from '@/lib/bench/weighing'
import { ringFractionChanged, plugLidFractionChanged } from '@/lib/carry/joint'
import { allowedMcChangePct, clearanceExactMm, clearanceFirstOrderMm, type Joint } from '@/lib/fit/lid-fit'
import { formatDuration } from '@/lib/format/times'
import { holdingHeat } from '@/lib/shop/heat'
import { dryToForEmc, warmToForEmc } from '@/lib/shop/warm-to'
import { waterInAirKg } from '@/lib/shop/water'
import { emcDoubtPct, emcPct, humidityForEmcPct } from '@/lib/wood/emc'
import { sizeChangeFromShrinkageMm, sizeChangeMm } from '@/lib/wood/movement'
import { findSpecies } from '@/lib/wood/species'
import { figure, figureWithUnit } from './figure'

/** A sum done by the program itself, with more digits than a page of the product would show. */
export type WorkedExample = {
  readonly id: string
  readonly given: string
  readonly lines: readonly { readonly what: string; readonly value: string }[]
  /** What a maker would take from it. */
  readonly so: string
}

/** A figure that an example was chosen to have. */
function present<T>(value: T | undefined): T {
  if (value === undefined) throw new RangeError('an example has no answer')
  return value
}

const found = (result: { ok: true; value: number } | { ok: false }): number => {
  if (!result.ok) throw new RangeError('an example has no answer')
  return result.value
}

function emcExample(): WorkedExample {
  const [temperatureC, humidityPct, wantedPct] = [20, 50, 9]
  return {
    id: 'emc',
    given: 'Air at 20 °C and 50 % RH.',
    lines: [
      { what: 'Wood ends at', value: figureWithUnit(emcPct(temperatureC, humidityPct), 4, '% MC') },
      {
        what: 'A sensor within 3 % RH and 0.3 K leaves open',
        value: `± ${figureWithUnit(emcDoubtPct(temperatureC, humidityPct), 2, '% MC')}`,
      },
      {
        what: 'Air at 20 °C that holds wood at 9 % MC',
        value: figureWithUnit(found(humidityForEmcPct(temperatureC, wantedPct)), 2, '% RH'),
      },
    ],
    so: 'A page of the product says about 9.3 % MC.',
  }
}

function airExample(): WorkedExample {
  const [fromC, humidityPct] = [8, 85]
  const warmed = [12, 15, 18, 20].map((toC) => {
    const afterPct = humidityAfterTemperatureChangePct(humidityPct, fromC, toC)
    return {
      what: `Warmed to ${figureWithUnit(toC, 0, '°C')}`,
      value: `${figureWithUnit(afterPct, 2, '% RH')}, ${figureWithUnit(emcPct(toC, afterPct), 2, '% MC')}`,
    }
  })
  return {
    id: 'air',
    given: 'A shop at 8 °C and 85 % RH, warmed with no water added or taken away.',
    lines: [
      { what: 'As it is', value: figureWithUnit(emcPct(fromC, humidityPct), 2, '% MC') },
      {
        what: 'Dew point, all the way',
        value: figureWithUnit(found(dewPointC(vapourPressurePa(fromC, humidityPct))), 2, '°C'),
      },
      ...warmed,
    ],
    so: 'Warming by some ten degrees does to the air what a dehumidifier would; the wood follows in days.',
  }
}

function movementExample(): WorkedExample {
  return {
    id: 'movement',
    given:
      '60 mm along the rings of hard maple that shrinks 9.9 % from green to oven-dry, from 8 to 12 % MC.',
    lines: [
      {
        what: 'From the whole shrinkage',
        value: figureWithUnit(sizeChangeFromShrinkageMm(60, 9.9, 8, 12), 4, 'mm'),
      },
      { what: 'By the coefficient 0.00353', value: figureWithUnit(sizeChangeMm(60, 0.00353, 4), 4, 'mm') },
    ],
    so: 'The two ways differ by less than wood differs from its own kind.',
  }
}

/** Hard maple in Table 13-5, 60 mm across with 0.2 mm of play. */
function mapleJoint(mcChangePct: number): Joint {
  const { tangentialPerPct = 0, radialPerPct = 0 } = present(findSpecies('acer-saccharum'))
  const part = { tangentialPerPct, radialPerPct, mcChangePct }
  return { diameterMm: 60, clearanceMm: 0.2, spigot: part, socket: part }
}

function fitExample(): WorkedExample {
  const joint = mapleJoint(4)
  const turned = [0, 30, 90].map((angleDeg) => ({
    what: `Least clearance, turned ${String(angleDeg)}°`,
    value: `${figureWithUnit(clearanceFirstOrderMm(joint, angleDeg), 4, 'mm')} by the short form, ${figureWithUnit(clearanceExactMm(joint, angleDeg), 4, 'mm')} from the ovals`,
  }))
  return {
    id: 'fit',
    given:
      'A hard-maple joint of 60 mm with 0.2 mm of clearance, both parts 4 points damper than when they were cut.',
    lines: [
      ...turned,
      {
        what: 'Change it stands at any angle',
        value: figureWithUnit(
          present(allowedMcChangePct(joint.diameterMm, joint.clearanceMm, joint.spigot, 90)),
          2,
          'points of % MC',
        ),
      },
    ],
    so: 'Below nought the lid may bind by that much: with the grain lined up it still turns, a little round it does not.',
  }
}

/** As in the check values of the ring: 700 kg/m³ at 10 °C and 11 % MC. */
const RING_WOOD = { densityKgM3: 700, temperatureC: 10, mcPct: 11 }

function followingExample(): WorkedExample {
  const size = { wallMm: 4, spigotMm: 6, grain: 'end-grain' } as const
  const ways = [
    ['Ring, both faces and its rim open', ringFractionChanged(size, { faces: 2, rim: 'open' }, RING_WOOD)],
    ['Ring, one face and its rim open', ringFractionChanged(size, { faces: 1, rim: 'open' }, RING_WOOD)],
    ['Plug lid of 8 mm, both faces open', plugLidFractionChanged(8, 2, RING_WOOD)],
  ] as const
  return {
    id: 'following',
    given:
      'A ring with a 4 mm wall and a 6 mm spigot, 700 kg/m³, at 10 °C and 11 % MC, after a step of the air.',
    lines: ways.map(([what, changed]) => ({
      what,
      value: [1, 3, 8, 14]
        .map((hours) => `${figure(changed(3600 * hours), 4)} after ${String(hours)} h`)
        .join(', '),
    })),
    so: 'A shift of the air reaches half of the ring within a morning; a plug lid lags it a little.',
  }
}

/** Ash ring carried from house to shop: all that the stated time hangs on. */
const ASH = {
  species: 'fraxinus-excelsior',
  diameterMm: 62,
  wallMm: 4,
  spigotMm: 6,
  allowanceMm: 0.15,
  fromMcPct: 8.5,
  toEmcPct: 13.6,
  temperatureC: 10,
} as const

function timeOutExample(): WorkedExample {
  const covers = [
    ['Open in work', 'open'],
    ['Lid on, handled', 'lid-on'],
    ['Closed, at rest', 'closed'],
  ] as const
  return {
    id: 'time-out',
    given:
      'European ash, 62 mm across, 4 mm wall, 6 mm spigot, 0.15 mm to lose, from a house at 8.5 % MC to a shop at 13.6 % MC and 10 °C; the lid keeps step with the ring.',
    lines: covers.map(([what, cover]) => {
      const answer = timeOutAnswer({ ...ASH, cover })
      if (!answer.binds) return { what, value: 'keeps its fit there' }
      return {
        what,
        value: `back within about ${formatDuration(answer.minutesEarly)}; more likely good for about ${formatDuration(answer.minutes)}${
          answer.minutesLate === undefined
            ? ''
            : `; 1 in 10 for longer than about ${formatDuration(answer.minutesLate)}`
        }`,
      }
    }),
    so: 'The first time is the one to keep: 1 in 10 such joints would have used up their allowance by then.',
  }
}

function weighingExample(): WorkedExample {
  const query = weighingQuerySchema.parse({ grams: '182.0,167.9,160.0', everyDays: '7' })
  const answer = weighingAnswer(query)
  if (!answer.ok) throw new RangeError('an example has no answer')
  const { finalGrams, timeConstantDays, mayForecast, words } = answer.value
  return {
    id: 'weighing',
    given: 'A blank that weighs 182.0, 167.9 and 160.0 g, a week apart.',
    lines: [
      { what: 'Heading for', value: figureWithUnit(finalGrams, 2, 'g') },
      { what: 'Time constant', value: figureWithUnit(timeConstantDays, 2, 'days') },
      { what: 'May a forecast be shown', value: mayForecast ? 'yes' : 'not yet' },
    ],
    so: words,
  }
}

function shopExample(): WorkedExample {
  const air = { temperatureC: 8, humidityPct: 85 }
  const warm = warmToForEmc(air, 9)
  const dryPct = dryToForEmc(air, 9)
  if (!warm.ok || !dryPct.ok) throw new RangeError('an example has no answer')
  return {
    id: 'shop',
    given: 'A shop of 40 m³ at 8 °C and 85 % RH that is to suit wood at 9 % MC.',
    lines: [
      {
        what: 'Warm it to',
        value: `${figureWithUnit(warm.value.temperatureC, 2, '°C')}, where it has ${figureWithUnit(warm.value.humidityPct, 2, '% RH')}`,
      },
      { what: 'Or dry it where it is to', value: figureWithUnit(dryPct.value, 2, '% RH') },
      {
        what: 'Water to take out of its air, once',
        value: figureWithUnit(waterInAirKg(40, air.temperatureC, air.humidityPct, dryPct.value), 4, 'kg'),
      },
      {
        what: 'Heat for its air, 10 K warmer than outside at one air change an hour',
        value: figureWithUnit(holdingHeat(40, 1, 10, undefined).airW, 0, 'W'),
      },
    ],
    so: 'The product says these as “about”, with two figures: walls and wood hold far more water than the air.',
  }
}

function saltsExample(): WorkedExample {
  return {
    id: 'salts',
    given: 'Six wet salts in a sealed box at 20 °C.',
    lines: saltFixedPoints(20).map(({ salt, humidityPct, doubtPct }) => ({
      what: salt,
      value: `${figure(humidityPct, 2)} ± ${figureWithUnit(doubtPct, 2, '% RH')}`,
    })),
    so: 'Two of them tell a sensor’s slope as well as its offset.',
  }
}

function doubtExample(): WorkedExample {
  const airs = [
    [20, 40],
    [20, 50],
    [12, 75],
    [8, 85],
  ] as const
  return {
    id: 'doubt',
    given: 'A sensor within 3 % RH and 0.3 K.',
    lines: [
      ...airs.map(([temperatureC, humidityPct]) => ({
        what: `EMC at ${figureWithUnit(temperatureC, 0, '°C')} and ${figureWithUnit(humidityPct, 0, '% RH')}`,
        value: `± ${figureWithUnit(emcDoubtPct(temperatureC, humidityPct), 2, '% MC')}`,
      })),
      {
        what: 'Between two rooms near 50 % RH',
        value: `± ${figureWithUnit(Math.hypot(emcDoubtPct(20, 50), emcDoubtPct(20, 50)), 2, 'points of % MC')}`,
      },
    ],
    so: 'In damp cold air the same sensor says three times less about wood than in a warm room.',
  }
}

/** Every worked example, in the order of the page. */
export const workedExamples = (): readonly WorkedExample[] => [
  emcExample(),
  airExample(),
  movementExample(),
  fitExample(),
  followingExample(),
  timeOutExample(),
  weighingExample(),
  shopExample(),
  saltsExample(),
  doubtExample(),
]
