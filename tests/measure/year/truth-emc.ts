/**
 * Where wood of this site ends in an air, % MC. The published curve of the Wood Handbook (FPL-GTR-190, 2010, Eq. 4-5, °C),
 * written out once more so that nothing is shared, and bent by the site's own share: wood differs from the curve by half a
 * point to a point, more in damp air than in dry.
 */
export function trueEmcPct(temperatureC: number, humidityPct: number, bend: number): number {
  const t = Math.max(0, temperatureC)
  const h = Math.min(0.98, Math.max(0, humidityPct / 100))
  const w = 349 + t * (1.29 + 0.0135 * t)
  const k = (0.805 + t * (0.000736 - 0.00000273 * t)) * h
  const k1 = 6.27 - t * (0.00938 + 0.000303 * t)
  const k2 = 1.91 + t * (0.0407 - 0.000293 * t)
  const bound = (k1 * k + 2 * k1 * k2 * k * k) / (1 + k1 * k + k1 * k2 * k * k)
  return Math.min(28, (1 + bend) * (1800 / w) * (k / (1 - k) + bound))
}
