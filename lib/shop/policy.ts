/** Limits of what is said about a shop. Each stands here with its reason and its status. */

/** No shop is told to be warmed beyond this, °C: nobody works in more, and resting wood cracks. A guess. */
export const warmestShopC = 35

/** Under this RH heated air dries blanks so fast that they crack, % RH. Common practice, no source. */
export const tooDryHumidityPct = 35

/** A surface this close to the dew point counts as about to be wet, K: two sensors at ± 0.3 K and their places. A guess. */
export const nearDewPointK = 1

/** RH at a surface above which mould grows, % RH (ASHRAE 160-2009: 30-day mean surface RH under 80 %). */
export const mouldSurfaceHumidityPct = 80

/** Compressor dehumidifiers lose most of what they take out below this, °C. From memory. */
export const compressorColdC = 12
