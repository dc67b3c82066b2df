/** Parts of a site that pages read; the first words of their query keys. */
export type Area =
  'frame' | 'now' | 'rooms' | 'sensors' | 'pieces' | 'woods' | 'carries' | 'notices' | 'members' | 'refused'

/** `['site', site, area, …]`: what a query is filed under, so that a change can have it fetched again. */
export const siteKey = (site: string, area: Area, ...rest: readonly unknown[]) =>
  ['site', site, area, ...rest] as const

export type LiveKind = 'reading' | 'carry' | 'piece' | 'room' | 'sensor' | 'wood' | 'notice' | 'site'

/** Which areas a change of each kind may show in. */
export const areasOf: Record<LiveKind, readonly Area[] | 'all'> = {
  reading: ['now', 'rooms', 'sensors', 'carries', 'frame'],
  carry: ['now', 'carries', 'pieces', 'rooms'],
  piece: ['now', 'carries', 'pieces', 'rooms', 'frame'],
  room: ['now', 'rooms', 'sensors', 'pieces', 'carries', 'frame'],
  sensor: ['now', 'rooms', 'sensors', 'refused', 'frame'],
  // Other figures for a wood give other verdicts.
  wood: ['woods', 'now', 'carries', 'pieces', 'rooms'],
  notice: ['now', 'notices', 'frame'],
  site: 'all',
}

export function isLiveKind(value: unknown): value is LiveKind {
  return typeof value === 'string' && Object.hasOwn(areasOf, value)
}
