/** Smooth noise between -1 and 1: the same channel and place give the same value, whoever asks and in whatever order. */
export type Noise = (channel: number, x: number) => number

/** Spreads the bits of an integer; the constants are those of the MurmurHash3 finaliser (public domain, 2011). */
function mixed(value: number): number {
  let h = value | 0
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b)
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35)
  return (h ^ (h >>> 16)) >>> 0
}

/** A value from 0 up to (not including) 1 that belongs to these three integers. */
export const hashed = (seed: number, channel: number, index: number): number =>
  mixed(mixed(mixed(seed) ^ Math.imul(channel, 0x9e3779b1)) ^ index) / 4_294_967_296

/**
 * Value noise: a hash at every whole x, joined by a curve whose slope is nought at the joints.
 * A function of x alone, so that years of history and the reading of this minute lie on one curve.
 */
export function createNoise(seed: number): Noise {
  return (channel, x) => {
    const index = Math.floor(x)
    const part = x - index
    const blend = part * part * (3 - 2 * part)
    const from = hashed(seed, channel, index)
    const to = hashed(seed, channel, index + 1)
    return 2 * (from + (to - from) * blend) - 1
  }
}
