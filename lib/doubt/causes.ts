import { logSpreadNineInTen, together } from './spread'

/**
 * How far what the model goes by may be out. Each is the ratio within which it lies nine times in ten, the same for every
 * piece; what a piece or a site knows better replaces it where it is used.
 */

/** Diffusion through wood of a known density. Status: derived, from measured aspen and spruce against the formula. */
export const DIFFUSION_FACTOR = 2

/**
 * Times run from 1.4 to 0.65 of themselves where moisture moves 3 to 50 times as fast along the grain as across it,
 * instead of 10 times. Enters as a doubt of the pace, as a factor on diffusion. Status: derived.
 */
export const END_GRAIN_FACTOR = 1.5

/** Movement within one species, ±20 %, the longer side (1 / 0.8) either way. Status: spread from memory. */
export const SPECIES_MOVEMENT_FACTOR = 1.25
/** Movement where only the class is known, ±40 %, counted once. Status: derived. */
export const CLASS_MOVEMENT_FACTOR = 1.5

/** An allowance that the maker gave or measured, ±30 %, the longer side (1 / 0.7) either way. Status: guess. */
export const TOLD_ALLOWANCE_FACTOR = 1.4

/** Spread of the pace of the wood, as the standard deviation of a logarithm. */
export const PACE_LOG_SPREAD = together(
  logSpreadNineInTen(DIFFUSION_FACTOR),
  logSpreadNineInTen(END_GRAIN_FACTOR),
)

/**
 * A wall at the spigot that nobody measured, 1.8 to 3.5 mm where 2.5 is taken; as a factor on diffusion, as a time goes
 * with the wall to the power of about 1.5. Status: guess.
 */
export const ASSUMED_WALL_FACTOR = 1.6
/**
 * How fast a bag or a tub leaks: its film, its seal and how often it is opened all differ. Status: guess, as are the figures
 * in `lib/follow/cover-leak.ts` that it goes with.
 */
export const COVER_LEAK_FACTOR = 3
/** A spigot that nobody measured: the rim is a smaller way in than the wall. Status: guess. */
export const ASSUMED_SPIGOT_FACTOR = 1.2
