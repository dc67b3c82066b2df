/** A no-break space, so that a figure never parts from its unit at the end of a line. */
const NBSP = '\u00a0'

/**
 * A figure as one would say it of a shop: two digits that count, no more. "130", "0.13", "18".
 * @param value any finite number
 */
export function twoFigures(value: number): string {
  if (value === 0) return '0'
  const size = Math.abs(value)
  const digits = Math.max(0, 1 - Math.floor(Math.log10(Number(size.toPrecision(2)))))
  const text = Number(size.toPrecision(2)).toFixed(digits)
  return value < 0 ? `−${text}` : text
}

/** "about 0.13 kg"; under 0.1 kg in grams. */
export function aboutMass(kg: number): string {
  return Math.abs(kg) < 0.1 ? `about ${twoFigures(1000 * kg)}${NBSP}g` : `about ${twoFigures(kg)}${NBSP}kg`
}

/** "about 130 W"; from 1 kW on in kilowatts. */
export function aboutPower(watts: number): string {
  return Math.abs(watts) < 1000
    ? `about ${twoFigures(watts)}${NBSP}W`
    : `about ${twoFigures(watts / 1000)}${NBSP}kW`
}
