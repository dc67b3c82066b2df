import type { WoodState } from './wood-state'

/** Doubt of the EMC that a sensor in a house gives, ± % MC. Status: derived (±3 % RH near 50 % RH). */
export const HOUSE_SENSOR_DOUBT_PCT = 0.5
/** Doubt of wood that nobody followed: of hours without a reading, of the time before the record, ± % MC. Status: guess. */
export const UNFOLLOWED_DOUBT_PCT = 1.5

/** How far wood may be out for what was not heard of it, ± % MC, 8 in 10. */
export const startDoubtPct = ({ unknownShare }: Pick<WoodState, 'unknownShare'>): number =>
  UNFOLLOWED_DOUBT_PCT * unknownShare

/**
 * How far what was followed between two moments may be out for other reasons than the sensor's offset: its drift, the pace
 * of the wood within a keep room's small swings, ± % MC. Status: guess, on the cautious side: at 0.3, which is what the
 * simulated year's wood was out by, 15 in 100 of its boxes bound before an early edge that 10 in 100 are meant to.
 */
export const FOLLOWED_BETWEEN_DOUBT_PCT = 0.4

/**
 * How far wood as followed may be out against its own cut, ± % MC, 8 in 10, where nothing went unheard since.
 * @param cutDoubtPct of the moisture content at the cut by itself, 0 and up
 *
 * Cut and present are read by the same kind of sensor in the same house, mostly by the same one: what it is off by all
 * the time is in both, and a joint feels only their difference. Its offset against the air elsewhere is counted with that
 * air. Source: derived, JCGM 100:2008, 5.2 (correlated quantities).
 */
export const sinceCutDoubtPct = (cutDoubtPct: number): number =>
  cutDoubtPct === 0
    ? 0
    : Math.hypot(
        Math.sqrt(Math.max(0, cutDoubtPct ** 2 - HOUSE_SENSOR_DOUBT_PCT ** 2)),
        FOLLOWED_BETWEEN_DOUBT_PCT,
      )

/** How far wood as followed may be out, ± % MC, 8 in 10: the sensor's, and more the more hours had no reading. */
export const mcDoubtPct = (state: Pick<WoodState, 'unknownShare'>): number =>
  Math.hypot(HOUSE_SENSOR_DOUBT_PCT, startDoubtPct(state))
