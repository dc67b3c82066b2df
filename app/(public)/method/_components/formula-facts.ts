import { exactly } from '@/lib/method/figure'
import type { MethodStatus } from '@/lib/method/status'

/** A formula and its papers. */
export type FormulaFacts = {
  readonly id: string
  readonly title: string
  /** What it says, before any sign. */
  readonly plain: string
  /** Lines of notation, as `mathOf` takes them. */
  readonly lines: readonly string[]
  /** What the letters stand for. */
  readonly letters: string
  readonly source: string
  readonly status: MethodStatus
  readonly range: string
  readonly limits: string
  readonly doubt: string
}

/** "349 + 1.29 T + 0.0135 T^2": a polynomial as it is reckoned with. */
export function polynomial(coefficients: readonly number[], variable: string): string {
  return coefficients
    .map((coefficient, power) => ({ coefficient, power }))
    .filter(({ coefficient }) => coefficient !== 0)
    .map(({ coefficient, power }, n) => {
      const sign = coefficient < 0 ? '−' : n === 0 ? '' : '+'
      const variablePart = power === 0 ? '' : power === 1 ? variable : `${variable}^${String(power)}`
      return `${sign} ${powerOfTen(Math.abs(coefficient))} ${variablePart}`.trim()
    })
    .join(' ')
}

/** A figure in notation: as it stands, or with a power of ten where it is very small or large. */
export function powerOfTen(value: number): string {
  if (value === 0 || (Math.abs(value) >= 1e-4 && Math.abs(value) < 1e5)) return exactly(value)
  const [mantissa = '', exponent = '0'] = value.toExponential().split('e')
  return `${mantissa.replace('-', '−')} × 10^{${String(Number(exponent)).replace('-', '−')}}`
}
