/** A no-break space, so that a figure never parts from its unit at the end of a line. */
const NBSP = '\u00a0'

/**
 * A figure for the method page, where digits count: with a true minus sign, and never a minus before nought.
 * @param value any finite number
 * @param digits decimals, 0 to 20
 */
export function figure(value: number, digits: number): string {
  const text = value.toFixed(digits)
  return Number(text) === 0 ? (0).toFixed(digits) : text.replace('-', '−')
}

/** The same with its unit: "9.27 % MC". */
export const figureWithUnit = (value: number, digits: number, unit: string): string =>
  unit === '' ? figure(value, digits) : `${figure(value, digits)}${NBSP}${unit.replaceAll(' ', NBSP)}`

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹'

/** "7 × 10⁻⁶": so many decimals before the power of ten. */
export function scientific(value: number, digits: number): string {
  const [mantissa = '', exponent = '0'] = value.toExponential(digits).split('e')
  const power = [...String(Math.abs(Number(exponent)))].map((digit) => SUPERSCRIPTS[Number(digit)]).join('')
  return `${mantissa.replace('-', '−')}${NBSP}×${NBSP}10${Number(exponent) < 0 ? '⁻' : ''}${power}`
}

/** As it stands in the program, with a true minus sign: for coefficients, which are printed whole. */
export const exactly = (value: number): string => String(value).replace('-', '−')

/** A share as a percentage: 0.75 is "75 %". */
export const percent = (share: number, digits = 0): string => figureWithUnit(100 * share, digits, '%')
