/**
 * When the product speaks, and how long a reading counts. Each threshold stands here with its reason and its status;
 * none stands in a component or a query.
 */
const minuteMs = 60_000
const hourMs = 60 * minuteMs

/** A planned stay counts as fine only with this much room before the early edge. Common practice, no source. */
export const fineMarginMs = 30 * minuteMs
/** The least stay that is of any use in the shop. Common practice, no source. */
export const leastUsefulStayMs = 30 * minuteMs

/** Two rooms closer than this cannot be told apart: root-sum of two sensors at ±3 % RH near 50 % RH (derived). */
export const noTellingDifferencePct = 0.7

/** Told this long before a planned carry. A guess, to be learned from use. */
export const warnBeforePlannedMs = 60 * minuteMs
/** And at this hour the evening before, in the site's zone. A guess. */
export const warnEveningBefore = '19:00'

/** Told before the early edge by the larger of 10 min and a quarter of the time out, an hour at most (derived). */
export function warnBeforeEarlyEdgeMs(
  timeOutMs: number,
  leastMs: number = 10 * minuteMs,
  mostMs: number = 60 * minuteMs,
): number {
  return Math.min(Math.max(leastMs, mostMs), Math.max(leastMs, timeOutMs / 4))
}

/** Last call comes this long before quiet hours. A guess. */
export const lastCallBeforeQuietMs = 30 * minuteMs

/** A verdict worsens once 2 readings over at least 5 min say so, and betters after 30 min (noise between readings). */
export const worsenAfterReadings = 2
export const worsenAfterMs = 5 * minuteMs
export const betterAfterMs = 30 * minuteMs

/** Usual gap of a sensor that has not yet shown one. Common practice, no source. */
export const assumedGapS = 300

/**
 * How long a reading counts as the present air of a room. All guesses: a shop's air turns within the hour when the
 * door stands open or a stove is lit; a keep room's does not. Typed readings carry ± 5 % RH besides.
 */
export function freshForMs(options: {
  isKeepingRoom: boolean
  isTyped: boolean
  usualGapS: number | null
}): number {
  if (options.isTyped) return (options.isKeepingRoom ? 24 : 2) * hourMs
  if (options.isKeepingRoom) return 6 * hourMs
  const threeGapsMs = 3 * (options.usualGapS ?? assumedGapS) * 1000
  return Math.min(2 * hourMs, Math.max(30 * minuteMs, threeGapsMs))
}

/** A sensor is silent after 6 of its usual gaps, 2 h at least. A guess. */
export function silentAfterMs(usualGapS: number | null, gaps = 6, leastMs: number = 2 * hourMs): number {
  return Math.max(leastMs, gaps * (usualGapS ?? assumedGapS) * 1000)
}

/** Doubt of RH, ± % RH (middle 8 in 10): a common sensor's data sheet figure, from memory; typed in by hand, a guess. */
export const sensorHumidityDoubtPct = 3
export const typedHumidityDoubtPct = 5
/** Doubt of temperature, ± K, for either. Common data sheets, from memory. */
export const temperatureDoubtK = 0.3

/** Over this a room is called damp and the mould caution is shown (ASHRAE 160-2009's 80 % surface RH criterion). */
export const mouldCautionHumidityPct = 80

/** A bring-back can be undone for this long. A guess: longer than it takes to notice a wrong press. */
export const undoBringBackMs = 10 * minuteMs
/** And so can a put-off. A guess. */
export const undoPutOffMs = 10 * minuteMs
/** The end of a plan that comes again can be taken back for this long. A guess. */
export const undoEndRepeatMs = 24 * hourMs

/** A plan that nobody started is not spoken of any more this long after its hour: the moment is past. A guess. */
export const planLapsesMs = 60 * minuteMs

/** No answer for this long after "bring it in" or lock-up: the rest of the house list is told. A guess. */
export const nextPersonAfterMs = 20 * minuteMs
/** Whoever is going now is asked again after this long. From the job itself: across a yard and back. A guess. */
export const askAgainAfterMs = 15 * minuteMs

/** A room rule clears this far inside its limit, points of % MC (derived: noise between two rooms). */
export const roomHysteresisPct = noTellingDifferencePct
/** The same for a limit of humidity, % RH: 0.7 points near 40 to 75 % RH are about this (derived, slope of Eq. 1). */
export const humidityHysteresisPct = 3

/** A keep room's band: own middle of twelve months, this far either way, for so many days (derived). */
export const keepBandHalfPct = 1.5
export const keepBandDays = 2
/** Days of record before a room's own middle counts; until then the common band. Common practice, no source. */
export const ownMiddleDaysMin = 60
export const commonBandLowPct = 7
export const commonBandHighPct = 12

/** Damper than its own normal: above nine in ten days of the same weeks of earlier years, by more than two rooms differ. */
export const normalQuantile = 0.9
/** The same weeks: this many days either way of the same day of earlier years, whatever the hemisphere. A guess. */
export const sameWeeksDays = 21
/** Fewer such days say nothing. A guess. */
export const sameWeeksDaysMin = 20
export const damperDays = 2

/** Little growth of mould below 75 to 80 % RH (from the literature on ASHRAE 160-2009; 75 is the cautious end). */
export const mouldTellHumidityPct = 75
export const mouldTellDays = 7
/** 30-day mean of surface RH and of temperature: ASHRAE 160-2009, as told by ASTM STP 1599 (2017). */
export const mouldWarnHumidityPct = 80
export const mouldWarnDays = 30
export const mouldWarnC = 5
/** Inside surface of a wall: T room - (1 - f)(T room - T outside). Cautious default, from memory. */
export const wallTemperatureFactor = 0.75
/** Rooms that keep no dry work are spoken of once a season. */
export const seasonDays = 90

/** Resting wood dries and checks in such air. A guess. */
export const tooDryHumidityPct = 35
export const tooDryDays = 3

/** Iron is about to be wet when it is this near to the dew point of its air, K (from memory). */
export const coldIronK = 1
/** And dry again this much further off. A guess. */
export const coldIronClearK = 1

/** A tub that falls this far within an hour was carried out of the house. A guess. */
export const tubFallK = 4

/** Told when a box at rest has used this share of its allowance: early enough to move it. A guess. */
export const losingFitUsedPct = 80
export const losingFitClearPct = 10

/** A coin cell holds its voltage to near the end: what it tells at this charge is weeks, not months. From memory. */
export const batteryLowPct = 15
export const batteryClearPct = 5

/** More than a slip of one message. A guess. */
export const refusedPerHour = 10
