import type { WoodState } from './wood-state'

/** Doubt of the EMC that a sensor in a house gives, ± % MC. Status: derived (±3 % RH near 50 % RH). */
export const HOUSE_SENSOR_DOUBT_PCT = 0.5
/** Doubt of wood that nobody followed: of hours without a reading, of the time before the record, ± % MC. Status: guess. */
export const UNFOLLOWED_DOUBT_PCT = 1.5

/** How far wood may be out for what was not heard of it, ± % MC, 8 in 10. */
export const startDoubtPct = ({ unknownShare }: Pick<WoodState, 'unknownShare'>): number =>
  UNFOLLOWED_DOUBT_PCT * unknownShare

/** How far wood as followed may be out, ± % MC, 8 in 10: the sensor's, and more the more hours had no reading. */
export const mcDoubtPct = (state: Pick<WoodState, 'unknownShare'>): number =>
  Math.hypot(HOUSE_SENSOR_DOUBT_PCT, startDoubtPct(state))
