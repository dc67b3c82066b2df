/** A quantity at each whole hour since 1970. */
export type Hourly = (hour: number) => number

/** Keeps what was once worked out: neighbouring readings ask for the same hours again and again. */
export function remembered(series: Hourly): Hourly {
  const known = new Map<number, number>()
  return (hour) => {
    const before = known.get(hour)
    if (before !== undefined) return before
    const value = series(hour)
    known.set(hour, value)
    return value
  }
}

/** How many time constants back a lag remembers; what lies before weighs under one percent. */
const REMEMBERED = 5

/**
 * What a sluggish body makes of a quantity: the mean of its past, fading with the time constant.
 * A window of fixed length instead of a running figure, so that any hour can be asked for by itself.
 * @param tauHours time constant, hours
 * @param stepHours distance of the hours that are looked at; more than one for what changes over weeks
 */
export function lagged(series: Hourly, tauHours: number, stepHours = 1): Hourly {
  const taps = Math.max(1, Math.ceil((REMEMBERED * tauHours) / stepHours))
  const fade = Math.exp(-stepHours / tauHours)
  return remembered((hour) => {
    let sum = 0
    let weights = 0
    let weight = 1
    for (let tap = 0; tap < taps; tap++) {
      sum += weight * series(hour - tap * stepHours)
      weights += weight
      weight *= fade
    }
    return sum / weights
  })
}

/** The value at any instant between two hours, on a straight line. */
export function atInstant(series: Hourly, hours: number): number {
  const hour = Math.floor(hours)
  const part = hours - hour
  const from = series(hour)
  return part === 0 ? from : from + part * (series(hour + 1) - from)
}
