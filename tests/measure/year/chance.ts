/** Chance that comes out the same for the same seed: each purpose has a stream of its own, so that none shifts another. */
export interface Chance {
  /** From 0 to below 1, evenly. */
  readonly even: () => number
  readonly between: (least: number, most: number) => number
  /** Of mean 0 and standard deviation 1. */
  readonly normal: () => number
  readonly happens: (probability: number) => boolean
  readonly pick: <T>(list: readonly [T, ...T[]]) => T
}

/** Source: the mixing of mulberry32, in the public domain; Box and Muller for the normal one. */
export function chanceOf(seed: number, purpose: string): Chance {
  let state = seed >>> 0
  for (const letter of purpose) state = Math.imul(state ^ (letter.codePointAt(0) ?? 0), 0x01000193) >>> 0
  const even = (): number => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state)
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32
  }
  return {
    even,
    between: (least, most) => least + (most - least) * even(),
    normal: () => Math.sqrt(-2 * Math.log(1 - even())) * Math.cos(2 * Math.PI * even()),
    happens: (probability) => even() < probability,
    pick: (list) => list[Math.floor(even() * list.length)] ?? list[0],
  }
}

/** A factor that lies within `ratio` either way nine times in ten. */
export const factorNineInTen = (chance: Chance, ratio: number): number =>
  Math.exp((Math.log(ratio) / 1.645) * chance.normal())
