import type { Film } from '@/lib/follow/finish'

export type EffectivenessRow = {
  readonly finish: string
  readonly coats: number
  /** % of the water that bare wood takes up which the finish keeps out after 1, 7 and 14 days. */
  readonly afterDaysPct: readonly [number, number, number]
  readonly status: 'read' | 'secondary'
  /** The film here whose figure was worked out from the row; absent for rows that are only shown. */
  readonly film?: Film
}

export const EFFECTIVENESS_DAYS = [1, 7, 14] as const

/**
 * Moisture-excluding effectiveness on ponderosa pine at 27 °C (80 °F), from 30 to 90 % RH.
 * Source: Wood Handbook (FPL-GTR-190, 2010), Table 16-3 (p. 16-4); rows marked `secondary` from a magazine that quotes the
 * same laboratory.
 */
export const EFFECTIVENESS_TABLE: readonly EffectivenessRow[] = [
  { finish: 'Linseed oil', coats: 1, afterDaysPct: [12, 0, 0], status: 'read' },
  { finish: 'Linseed oil', coats: 2, afterDaysPct: [22, 0, 0], status: 'read' },
  { finish: 'Linseed oil', coats: 3, afterDaysPct: [33, 2, 0], status: 'read', film: 'oil' },
  { finish: 'Urethane varnish, oil-modified', coats: 1, afterDaysPct: [55, 10, 2], status: 'read' },
  { finish: 'Urethane varnish, oil-modified', coats: 2, afterDaysPct: [83, 43, 23], status: 'read' },
  {
    finish: 'Urethane varnish, oil-modified',
    coats: 3,
    afterDaysPct: [90, 64, 44],
    status: 'read',
    film: 'varnish',
  },
  { finish: 'Lacquer', coats: 2, afterDaysPct: [70, 22, 8], status: 'secondary', film: 'lacquer' },
  { finish: 'Shellac', coats: 2, afterDaysPct: [84, 43, 20], status: 'secondary', film: 'shellac' },
  { finish: 'Two-part epoxy', coats: 2, afterDaysPct: [98, 93, 88], status: 'secondary', film: 'epoxy' },
]
