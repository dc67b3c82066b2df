/** An hour of a shop's air on record. */
export interface ShopHour {
  /** Its start, epoch ms. */
  at: number
  temperatureC: number
  /** The least and the greatest EMC read within it, % MC. */
  emcPctMin: number
  emcPctMax: number
}

export interface ShopUse {
  isUsed: boolean
  /** What says so, the surest first; null where nothing does. */
  why: 'carried' | 'warmed' | 'opened' | null
}

/**
 * A stove lifts a shop by this much within two hours; sun on a closed one hardly does. Status: guess.
 */
export const WARMED_BY_K = 3
const warmedWithinMs = 2 * 3_600_000

/** A door that stands open swings the air by this much within one hour, % MC of EMC. Status: guess. */
export const OPENED_BY_PCT = 1.2

/**
 * Whether somebody worked in the shop today, as far as its record tells: then something may stand out there that
 * nobody logged. Warmed or opened with no carry logged, the evening question is asked with nothing out.
 * @param shops the hours of one day, a list for each shop, oldest first; hours without a reading are left out
 * @param carriesToday how many carries went out to a shop or came back from one that day
 *
 * Source: none; derived from what a stove and an open door do. Status: guess. It asks once too often rather than never.
 */
export function shopWasUsed(shops: readonly (readonly ShopHour[])[], carriesToday: number): ShopUse {
  if (carriesToday > 0) return { isUsed: true, why: 'carried' }
  if (shops.some(wasWarmed)) return { isUsed: true, why: 'warmed' }
  if (shops.some(wasOpened)) return { isUsed: true, why: 'opened' }
  return { isUsed: false, why: null }
}

const wasWarmed = (hours: readonly ShopHour[]): boolean =>
  hours.some((hour) =>
    hours.some(
      (before) =>
        before.at < hour.at &&
        hour.at - before.at <= warmedWithinMs &&
        hour.temperatureC - before.temperatureC >= WARMED_BY_K,
    ),
  )

const wasOpened = (hours: readonly ShopHour[]): boolean =>
  hours.some((hour) => hour.emcPctMax - hour.emcPctMin >= OPENED_BY_PCT)

/** "The shop was warmed today." Empty where nothing says that it was used. */
export const shopUseWords: Record<NonNullable<ShopUse['why']>, string> = {
  carried: 'Pieces went to the shop today.',
  warmed: 'The shop was warmed today.',
  opened: 'The air in the shop changed quickly today, as when its door stands open.',
}
