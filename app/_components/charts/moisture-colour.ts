/** Ends of the dry-to-damp scale, % MC. A heated room in a hard winter, and a shop in a wet autumn; the middle between. */
const DRY_PCT = 6
const MID_PCT = 11
const DAMP_PCT = 17

/**
 * The fill that stands for a moisture content, in flat steps of 1 % MC. Means moisture and nothing else; damper is
 * always further from the ground in lightness. For fills, never for text.
 */
export function moistureColour(mcPct: number): string {
  const step = Math.min(DAMP_PCT, Math.max(DRY_PCT, Math.floor(mcPct)))
  if (step <= MID_PCT) return mix('dry', 'mid', (step - DRY_PCT) / (MID_PCT - DRY_PCT))
  return mix('mid', 'damp', (step - MID_PCT) / (DAMP_PCT - MID_PCT))
}

const mix = (from: string, to: string, share: number) =>
  `color-mix(in srgb, var(--${to}) ${String(Math.round(share * 100))}%, var(--${from}))`
