import {
  assumedGapS,
  betterAfterMs,
  fineMarginMs,
  freshForMs,
  lastCallBeforeQuietMs,
  leastUsefulStayMs,
  mouldCautionHumidityPct,
  noTellingDifferencePct,
  planLapsesMs,
  sensorHumidityDoubtPct,
  silentAfterMs,
  temperatureDoubtK,
  typedHumidityDoubtPct,
  undoBringBackMs,
  warnBeforeEarlyEdgeMs,
  warnBeforePlannedMs,
  warnEveningBefore,
  worsenAfterMs,
  worsenAfterReadings,
} from '@/lib/notices/policy'
import { METER_CALIBRATION_C, METER_DOUBT_PCT } from '@/lib/seasoning/meter'
import {
  assumedStepG,
  driftMissingShareMax,
  fineStepG,
  forecastBelowRateShare,
  forecastDoubtShareMax,
  furthestReadyMs,
  leastReadySpanMs,
  lightUnderG,
  meterBesideWeightMs,
  readyDoubtPctMax,
  readyOverMs,
  readyWeights,
  readyWithinPct,
  restAfterNearFinalMs,
  restAfterRoughingMs,
  sameWeightShare,
  weighEveryMs,
  weighLightEveryMs,
} from '@/lib/seasoning/policy'
import { PROPANE_HEAT_KWH_PER_KG, PROPANE_WATER_KG_PER_KG } from '@/lib/shop/heater'
import {
  compressorColdC,
  mouldSurfaceHumidityPct,
  nearDewPointK,
  tooDryHumidityPct,
  warmestShopC,
} from '@/lib/shop/policy'
import { SURFACE_FACTOR } from '@/lib/shop/surface'
import { AIR_DENSITY_KG_M3 } from '@/lib/shop/water'
import type { DefaultGroup } from './defaults'
import { exactly, figureWithUnit, percent } from './figure'

const MINUTE_MS = 60_000
const HOUR_MS = 60 * MINUTE_MS
const DAY_MS = 24 * HOUR_MS

const minutes = (ms: number): string => figureWithUnit(ms / MINUTE_MS, 0, 'min')
const hours = (ms: number): string => figureWithUnit(ms / HOUR_MS, 0, 'h')
const days = (ms: number): string => figureWithUnit(ms / DAY_MS, 0, 'days')
const points = (pct: number): string => figureWithUnit(pct, 1, 'points of % MC')

/** Kinds of reading whose age counts differently. */
const freshShop = (usualGapS: number): string =>
  minutes(freshForMs({ isKeepingRoom: false, isTyped: false, usualGapS }))
const freshTyped = (isKeepingRoom: boolean): string =>
  hours(freshForMs({ isKeepingRoom, isTyped: true, usualGapS: null }))
/** A sensor that speaks each day shows how long the longest wait is; one each minute, the shortest. */
const QUICK_GAP_S = 60
const SLOW_GAP_S = 86_400

const carryGroup: DefaultGroup = {
  id: 'threshold-carry',
  title: 'Carries and notices',
  rows: [
    {
      what: 'A planned stay is fine only with this much before the early edge',
      value: minutes(fineMarginMs),
      status: 'common practice, no source',
      why: 'Room for being late.',
    },
    {
      what: 'The least stay that is of any use',
      value: minutes(leastUsefulStayMs),
      status: 'common practice, no source',
      why: 'Shorter ones are not offered.',
    },
    {
      what: 'Two rooms closer than this cannot be told apart',
      value: points(noTellingDifferencePct),
      status: 'derived',
      why: 'Two sensors at ± 3 % RH near 50 % RH, as the root of the summed squares.',
    },
    {
      what: 'Told before a planned carry, and the evening before',
      value: `${minutes(warnBeforePlannedMs)}; at ${warnEveningBefore}`,
      status: 'guess',
      why: 'To be learned from use.',
    },
    {
      what: 'Told before the early edge',
      value: `a quarter of the time out, from ${minutes(warnBeforeEarlyEdgeMs(0))} to ${minutes(warnBeforeEarlyEdgeMs(Infinity))}`,
      status: 'derived',
      why: 'In proportion to how well the time is known.',
    },
    {
      what: 'Last call before quiet hours',
      value: minutes(lastCallBeforeQuietMs),
      status: 'guess',
      why: 'Nobody is to be woken for a lid.',
    },
    {
      what: 'A verdict worsens; betters',
      value: `after ${exactly(worsenAfterReadings)} readings over ${minutes(worsenAfterMs)}; after ${minutes(betterAfterMs)}`,
      status: 'guess',
      why: 'Noise between readings must not flip it.',
    },
    {
      what: 'A bring-back can be undone; a plan lapses',
      value: `${minutes(undoBringBackMs)}; ${minutes(planLapsesMs)}`,
      status: 'guess',
      why: 'Longer than it takes to notice a wrong press; the moment is past.',
    },
  ],
}

const readingGroup: DefaultGroup = {
  id: 'threshold-readings',
  title: 'Readings',
  rows: [
    {
      what: 'A reading counts as present in a room that swings',
      value: `three of its usual gaps, from ${freshShop(QUICK_GAP_S)} to ${freshShop(SLOW_GAP_S)}`,
      status: 'guess',
      why: 'A shop’s air turns within the hour when a door stands open.',
    },
    {
      what: 'And in a room where pieces are kept',
      value: hours(freshForMs({ isKeepingRoom: true, isTyped: false, usualGapS: null })),
      status: 'guess',
      why: 'A keep room’s air does not turn so fast.',
    },
    {
      what: 'A typed reading counts',
      value: `${freshTyped(false)}; in a keep room ${freshTyped(true)}`,
      status: 'guess',
      why: `And is doubted by ± ${figureWithUnit(typedHumidityDoubtPct, 0, '% RH')}.`,
    },
    {
      what: 'A sensor is silent',
      value: `after six of its usual gaps, ${hours(silentAfterMs(null))} at least`,
      status: 'guess',
      why: `One that has shown no gap yet is taken to send every ${figureWithUnit(assumedGapS, 0, 's')}.`,
    },
    {
      what: 'Doubt of a usual sensor',
      value: `± ${figureWithUnit(sensorHumidityDoubtPct, 0, '% RH')} and ± ${figureWithUnit(temperatureDoubtK, 1, 'K')}`,
      status: 'from memory',
      why: 'Data sheets give ± 2 to 3 % RH. Where it hangs matters more: 1 K is 3 % RH.',
    },
    {
      what: 'A room is called damp',
      value: `over ${figureWithUnit(mouldCautionHumidityPct, 0, '% RH')}`,
      status: 'read',
      why: 'ASHRAE 160-2009: 30-day mean RH at a surface under 80 %; later replaced there as too strict.',
    },
  ],
}

const weighingGroup: DefaultGroup = {
  id: 'threshold-weighing',
  title: 'Weighing and readiness',
  rows: [
    {
      what: 'Weights that are to be the same',
      value: `${exactly(readyWeights)} over ${days(readyOverMs)}`,
      status: 'common practice, no source',
      why: '“The same three times over two months.”',
    },
    {
      what: 'The same means within',
      value: `one step of the scale or ${percent(sameWeightShare, 1)} of the mass, the larger`,
      status: 'common practice, no source',
      why: `A scale’s step is taken as ${figureWithUnit(assumedStepG, 0, 'g')} until told.`,
    },
    {
      what: 'MC matches the home’s middle',
      value: `within ${points(readyWithinPct)}, known to ± ${points(readyDoubtPctMax)}`,
      status: 'derived',
      why: 'Two sensors’ noise, as between two rooms.',
    },
    {
      what: 'Rest after roughing; after near-final turning',
      value: `${days(restAfterRoughingMs)}; ${days(restAfterNearFinalMs)}`,
      status: 'common practice, no source',
      why: 'For stress as much as for water.',
    },
    {
      what: 'Weighed every',
      value: `${days(weighEveryMs)}; under ${figureWithUnit(lightUnderG, 0, 'g')} on a scale that shows ${figureWithUnit(fineStepG, 1, 'g')}, every ${days(weighLightEveryMs)}`,
      status: 'common practice, no source',
      why: 'As often as the scale can show a change.',
    },
    {
      what: 'No forecast until the loss has slowed to',
      value: `${percent(forecastBelowRateShare)} of its first rate`,
      status: 'derived',
      why: 'Until then wood looks closer to done than it is (slab series).',
    },
    {
      what: 'Nor while its end is known no better than',
      value: `${percent(forecastDoubtShareMax)} of the change`,
      status: 'guess',
      why: 'A wider answer is none.',
    },
    {
      what: 'Ready is told as a range of at least; not when it begins later than',
      value: `${days(leastReadySpanMs)}; ${days(furthestReadyMs)}`,
      status: 'guess',
      why: 'About as often as a maker looks; no fit reaches so far.',
    },
    {
      what: 'A meter reading goes with a weight taken within',
      value: days(meterBesideWeightMs),
      status: 'guess',
      why: 'Wood at rest changes little.',
    },
    {
      what: 'A meter’s doubt; its calibration',
      value: `± ${points(METER_DOUBT_PCT)}; at ${figureWithUnit(METER_CALIBRATION_C, 0, '°C')}`,
      status: 'read',
      why: 'Wood Handbook (2010), p. 13-3; the temperature from memory.',
    },
    {
      what: 'Drift is not corrected for beyond',
      value: `${percent(driftMissingShareMax)} without a record`,
      status: 'guess',
      why: 'Of what the wood remembers.',
    },
  ],
}

const shopGroup: DefaultGroup = {
  id: 'threshold-shop',
  title: 'The shop',
  rows: [
    {
      what: 'No shop is told to be warmed beyond',
      value: figureWithUnit(warmestShopC, 0, '°C'),
      status: 'guess',
      why: 'Nobody works in more, and resting wood cracks.',
    },
    {
      what: 'Heated air that cracks blanks',
      value: `under ${figureWithUnit(tooDryHumidityPct, 0, '% RH')}`,
      status: 'common practice, no source',
      why: 'It dries them so fast.',
    },
    {
      what: 'A surface counts as about to be wet',
      value: `within ${figureWithUnit(nearDewPointK, 0, 'K')} of the dew point`,
      status: 'guess',
      why: 'Two sensors at ± 0.3 K and their places.',
    },
    {
      what: 'Mould grows on a surface',
      value: `over ${figureWithUnit(mouldSurfaceHumidityPct, 0, '% RH')} there`,
      status: 'read',
      why: 'ASHRAE 160-2009, as a 30-day mean.',
    },
    {
      what: 'A cold surface that nobody measured',
      value: `${percent(SURFACE_FACTOR)} of the way from outside to inside`,
      status: 'from memory',
      why: 'Temperature factor as in ISO 13788; cautious.',
    },
    {
      what: 'Compressor dehumidifiers fade',
      value: `under ${figureWithUnit(compressorColdC, 0, '°C')}`,
      status: 'from memory',
      why: 'Desiccant ones do not.',
    },
    {
      what: 'Propane burnt in the room',
      value: `${exactly(PROPANE_WATER_KG_PER_KG)} kg of water and ${exactly(PROPANE_HEAT_KWH_PER_KG)} kWh for each kg`,
      status: 'derived',
      why: 'By molar masses; the heat from memory.',
    },
    {
      what: 'Density of air',
      value: figureWithUnit(AIR_DENSITY_KG_M3, 1, 'kg/m³'),
      status: 'read',
      why: 'A round figure, ASHRAE Handbook, Fundamentals (2017), ch. 1.',
    },
  ],
}

/** Thresholds at which the product says or does something, each from the constant that it runs on. */
export const productThresholds: readonly DefaultGroup[] = [carryGroup, readingGroup, weighingGroup, shopGroup]
