/**
 * Throws when an input is outside its range, naming the input. Written so that NaN fails too.
 * @throws RangeError
 */
export function assertInRange(name: string, value: number, min: number, max: number): void {
  if (!(value >= min && value <= max)) {
    throw new RangeError(`${name} must be between ${String(min)} and ${String(max)}, got ${String(value)}`)
  }
}

/**
 * Throws when an input is not above a bound, or is not a finite number.
 * @throws RangeError
 */
export function assertFiniteAbove(name: string, value: number, bound: number): void {
  if (!(value > bound && value < Infinity)) {
    throw new RangeError(`${name} must be a finite number above ${String(bound)}, got ${String(value)}`)
  }
}

/**
 * Throws when an input is NaN or infinite.
 * @throws RangeError
 */
export function assertFinite(name: string, value: number): void {
  if (!Number.isFinite(value)) {
    throw new RangeError(`${name} must be a finite number, got ${String(value)}`)
  }
}
