import { LONGITUDINAL_RATIO, SURFACE_M_PER_S } from '@/lib/carry/diffusion'
import {
  PLUG_LID_MM,
  SPIGOT_MM,
  WALL_MM,
  WALL_OF_BODY,
  WALL_OF_BODY_MAX_MM,
  WALL_OF_BODY_MIN_MM,
} from '@/lib/carry/joint-defaults'
import {
  CLASS_MOVEMENT_FACTOR,
  DIFFUSION_FACTOR,
  END_GRAIN_FACTOR,
  SPECIES_MOVEMENT_FACTOR,
  TOLD_ALLOWANCE_FACTOR,
} from '@/lib/doubt/causes'
import { DRAWS } from '@/lib/doubt/draws'
import { MOST_EXTRA_MM, STEP_MM, WIDEST_DOUBT_PCT } from '@/lib/fit/fit-check'
import {
  ALLOWANCE_OF_CLEARANCE,
  GRADE_FIGURES,
  GRADE_SPREAD,
  LEAST_ALLOWANCE_MM,
  SUCTION_ALLOWANCE_OF_CLEARANCE,
  TOLD_SPREAD,
  UNKNOWN_ALLOWANCE_HIGH_MM,
  UNKNOWN_ALLOWANCE_LOW_MM,
  UNKNOWN_ALLOWANCE_MM,
} from '@/lib/fit/grades'
import { BAG_G_PER_M2_DAY, TUB_CHANGES_PER_H, USUAL_BAG, USUAL_TUB } from '@/lib/follow/cover-leak'
import { HOUSE_SENSOR_DOUBT_PCT, UNFOLLOWED_DOUBT_PCT } from '@/lib/follow/doubt'
import { COUNTED_SHARE, FILM_M_PER_S } from '@/lib/follow/finish'
import { BINDS_FROM, FELT_FROM, OUTCOME_LOG_SPREAD } from '@/lib/follow/learned-pace'
import { BLANK_DIAMETER_MM, BLANK_LENGTH_OF_DIAMETER, ROUGHED_WALL_MM } from '@/lib/follow/piece-filter'
import { FIBRE_SATURATION_PCT, LONGITUDINAL_PER_PCT } from '@/lib/wood/movement'
import { CLASS_MOVEMENT, UNKNOWN_DENSITY_KG_M3, UNKNOWN_WOOD_CLASS } from '@/lib/wood/movement-class'
import { exactly, figure, figureWithUnit, percent, scientific } from './figure'
import type { MethodStatus } from './status'

export type DefaultRow = {
  readonly what: string
  readonly value: string
  readonly status: MethodStatus
  readonly why: string
}

/** Rows that belong together, under one heading. */
export type DefaultGroup = {
  readonly id: string
  readonly title: string
  readonly rows: readonly DefaultRow[]
}

const mm = (lengthMm: number, digits = 2): string => figureWithUnit(lengthMm, digits, 'mm')
const points = (pct: number): string => `± ${figureWithUnit(pct, 1, '% MC')}`
const factor = (value: number): string => `within a factor of ${figure(value, 2)}, nine times in ten`
const each = (perPct: number): string => figure(perPct, 5)

const gradeRows = (['suction', 'snap', 'snug', 'easy', 'loose', 'threaded'] as const).map(
  (grade): DefaultRow => {
    const { clearanceMm, allowanceMm } = GRADE_FIGURES[grade]
    return {
      what: `Fit: ${grade}`,
      value: `clearance ${mm(clearanceMm)}; ${allowanceMm === undefined ? 'no figure for what it may lose' : `may lose ${mm(allowanceMm)}`}`,
      status: 'guess',
      why: `Judged by hand; spread ± ${percent(GRADE_SPREAD)} of the figure. To be learned from how lids turned out.`,
    }
  },
)

const fitGroup: DefaultGroup = {
  id: 'default-fit',
  title: 'How a lid fits',
  rows: [
    ...gradeRows,
    {
      what: 'Nobody has said how it fits',
      value: `may lose ${mm(UNKNOWN_ALLOWANCE_MM)}, from ${mm(UNKNOWN_ALLOWANCE_LOW_MM)} to ${mm(UNKNOWN_ALLOWANCE_HIGH_MM)}`,
      status: 'guess',
      why: 'A middling fit, with a doubt that says so.',
    },
    {
      what: 'Share of a measured clearance that may go',
      value: `${percent(ALLOWANCE_OF_CLEARANCE)}; of a suction lid ${percent(SUCTION_ALLOWANCE_OF_CLEARANCE)}; ${mm(LEAST_ALLOWANCE_MM)} at least`,
      status: 'guess',
      why: 'The ratios of the grades above. Never the whole clearance.',
    },
    {
      what: 'An allowance told or measured',
      value: `± ${percent(TOLD_SPREAD)}`,
      status: 'guess',
      why: 'What calipers and a hand leave open.',
    },
    {
      what: 'A joint is cut no finer than',
      value: mm(STEP_MM),
      status: 'common practice, no source',
      why: '“Leave about 0.1 mm more” is told in these steps.',
    },
    {
      what: 'Most that may be left more',
      value: mm(MOST_EXTRA_MM),
      status: 'guess',
      why: 'And never beyond the clearance of the next looser grade: it would be another lid.',
    },
    {
      what: 'Wood known no better than this is not judged',
      value: points(WIDEST_DOUBT_PCT),
      status: 'derived',
      why: 'It takes as much as a snug lid may lose.',
    },
  ],
}

const classRows = (['small', 'medium', 'large'] as const).map((movementClass): DefaultRow => {
  const { radialPerPct, tangentialPerPct, differencePerPct } = CLASS_MOVEMENT[movementClass]
  return {
    what: `Movement class: ${movementClass}`,
    value: `across the rings ${each(radialPerPct)}, along them ${each(tangentialPerPct)}, difference ${each(differencePerPct)} for each % MC`,
    status: 'derived',
    why: 'Medians of the woods in the table; the difference is the largest in the class.',
  }
})

const woodGroup: DefaultGroup = {
  id: 'default-wood',
  title: 'What is taken of the wood',
  rows: [
    {
      what: 'Fibre saturation',
      value: figureWithUnit(FIBRE_SATURATION_PCT, 0, '% MC'),
      status: 'from memory',
      why: 'Wood Handbook (2010), ch. 4, the usual average. Some dense oily woods saturate at 22 to 23 %.',
    },
    {
      what: 'Along the grain',
      value: `${each(LONGITUDINAL_PER_PCT)} for each % MC`,
      status: 'read',
      why: 'Middle of 0.1 to 0.2 % from green to dry (American Wood Council). Curly or reaction wood may have ten times that.',
    },
    ...classRows,
    {
      what: 'Wood not known',
      value: `${UNKNOWN_WOOD_CLASS} movement, ${figureWithUnit(UNKNOWN_DENSITY_KG_M3, 0, 'kg/m³')}`,
      status: 'guess',
      why: 'A middling hardwood; the doubt of its movement is that of its class.',
    },
    {
      what: 'Wall at the spigot',
      value: `${mm(WALL_MM, 1)}, or ${percent(WALL_OF_BODY)} of the body’s wall, ${mm(WALL_OF_BODY_MIN_MM, 0)} to ${mm(WALL_OF_BODY_MAX_MM, 0)}`,
      status: 'guess',
      why: 'Where it was not told.',
    },
    {
      what: 'Spigot length; thickness of a plug lid',
      value: `${mm(SPIGOT_MM, 0)}; ${mm(PLUG_LID_MM, 0)}`,
      status: 'guess',
      why: 'Where they were not told.',
    },
    {
      what: 'Wall of a roughed blank; blank in the round',
      value: `${mm(ROUGHED_WALL_MM, 0)}; ${mm(BLANK_DIAMETER_MM, 0)} across and ${exactly(BLANK_LENGTH_OF_DIAMETER)} times as long`,
      status: 'guess',
      why: 'Where they were not told.',
    },
  ],
}

const followGroup: DefaultGroup = {
  id: 'default-follow',
  title: 'How fast wood follows, and under what',
  rows: [
    {
      what: 'Along the grain against across it',
      value: `${exactly(LONGITUDINAL_RATIO)} times as fast`,
      status: 'from memory',
      why: '“10 to 15 times” in drying manuals; reported from 2 to over 50. The least certain figure of a joint.',
    },
    {
      what: 'What a bare surface passes',
      value: `${scientific(SURFACE_M_PER_S, 0)} m/s`,
      status: 'derived',
      why: 'Mass transfer times saturation density times slope of the isotherm over dry density: 1.2 to 9 × 10⁻⁷ over 8 to 20 °C.',
    },
    ...(['oil', 'lacquer', 'shellac', 'varnish', 'epoxy'] as const).map((film): DefaultRow => ({
      what: `What a film passes: ${film}`,
      value: `${scientific(FILM_M_PER_S[film], 1)} m/s`,
      status: 'derived',
      why:
        film === 'oil' || film === 'varnish'
          ? 'From moisture-excluding effectiveness after one day, read.'
          : 'From moisture-excluding effectiveness after one day, at second hand.',
    })),
    {
      what: 'Share of a film’s resistance that counts',
      value: percent(COUNTED_SHARE),
      status: 'derived',
      why: 'A constant film promises too much after a week. Wax counts for nothing, and no finish cancels a warning.',
    },
    {
      what: 'A lidded tub',
      value: `${exactly(TUB_CHANGES_PER_H)} air changes an hour and one more at each opening; ${USUAL_TUB.kind === 'tub' ? `${exactly(USUAL_TUB.volumeL)} L opened ${exactly(USUAL_TUB.openingsPerHour)} time an hour` : ''}, ${figureWithUnit(USUAL_TUB.massG, 0, 'g')} of wood`,
      status: 'guess',
      why: 'Generous to the leak.',
    },
    {
      what: 'A thin bag',
      value: `${exactly(BAG_G_PER_M2_DAY)} g a day through a square metre from shop to house; ${USUAL_BAG.kind === 'bag' ? `${exactly(USUAL_BAG.areaM2)} m²` : ''} round ${figureWithUnit(USUAL_BAG.massG, 0, 'g')}`,
      status: 'guess',
      why: 'Ten times less for a thick one.',
    },
    {
      what: 'Allowance used that a hand feels; that binds',
      value: `from ${percent(FELT_FROM)}; from ${percent(BINDS_FROM)}`,
      status: 'guess',
      why: `For learning the pace of a site’s wood from how lids turned; spread ${figure(OUTCOME_LOG_SPREAD, 2)} in the logarithm.`,
    },
  ],
}

const doubtGroup: DefaultGroup = {
  id: 'default-doubt',
  title: 'How far each may be out',
  rows: [
    {
      what: 'Diffusion through wood of a known density',
      value: factor(DIFFUSION_FACTOR),
      status: 'derived',
      why: 'From measured aspen and spruce against the formula.',
    },
    {
      what: 'End grain, as a factor on the pace',
      value: factor(END_GRAIN_FACTOR),
      status: 'derived',
      why: 'Times run from 1.4 to 0.65 of themselves where end grain is 3 to 50 times as fast, not 10.',
    },
    {
      what: 'Movement within a species',
      value: factor(SPECIES_MOVEMENT_FACTOR),
      status: 'from memory',
      why: '± 20 %, taken the longer way.',
    },
    {
      what: 'Movement where only the class is known',
      value: factor(CLASS_MOVEMENT_FACTOR),
      status: 'derived',
      why: '± 40 %, counted once.',
    },
    {
      what: 'An allowance told or measured',
      value: factor(TOLD_ALLOWANCE_FACTOR),
      status: 'guess',
      why: '± 30 %, taken the longer way.',
    },
    {
      what: 'EMC by a sensor in a house',
      value: points(HOUSE_SENSOR_DOUBT_PCT),
      status: 'derived',
      why: '± 3 % RH near 50 % RH.',
    },
    {
      what: 'Wood that nobody followed',
      value: points(UNFOLLOWED_DOUBT_PCT),
      status: 'guess',
      why: 'For hours without a reading, by their share, and for the time before the record.',
    },
    {
      what: 'Ways in which everything could be',
      value: `${exactly(DRAWS)}, the same each time`,
      status: 'derived',
      why: 'Enough that the early edge is steady to a few percent.',
    },
  ],
}

/** Defaults of wood, joint and doubt, each from the constant that the program runs on. */
export const modelDefaults: readonly DefaultGroup[] = [fitGroup, woodGroup, followGroup, doubtGroup]
