import { SURFACE_M_PER_S } from '@/lib/carry/diffusion'

/** A film that slows moisture. Wax polish is none: 0 % after 14 days (Wood Handbook, FPL-GTR-190, 2010, Table 16-3). */
export type Film = 'oil' | 'lacquer' | 'shellac' | 'varnish' | 'epoxy'

/**
 * What a film lets through, m/s on moisture content. Status: derived from moisture-excluding effectiveness after one day
 * (Wood Handbook, FPL-GTR-190, 2010, Table 16-3, oil and varnish read; lacquer, shellac and epoxy at second hand).
 */
export const FILM_M_PER_S: Readonly<Record<Film, number>> = {
  oil: 7e-8,
  lacquer: 1.6e-8,
  shellac: 7e-9,
  varnish: 4e-9,
  epoxy: 8e-10,
}

/** Half of the resistance counts: a constant film promises up to 23 points too much after a week and 38 after two,
 * of the table that it comes from. Status: derived. */
export const COUNTED_SHARE = 0.5

const WORDS: readonly (readonly [RegExp, Film])[] = [
  [/epoxy|resin finish/i, 'epoxy'],
  [/varnish|polyurethane|urethane/i, 'varnish'],
  [/shellac|french polish|sanding sealer/i, 'shellac'],
  [/lacquer|melamine|acrylic/i, 'lacquer'],
  [/oil/i, 'oil'],
]

/** The film that a maker's words for a finish speak of; undefined for wax, for none, and for words not known here. */
export const filmOfFinish = (finish: string): Film | undefined =>
  WORDS.find(([pattern]) => pattern.test(finish))?.[1]

/**
 * What the surface of a finished piece at rest passes.
 * @returns m/s; the bare surface's where there is no film
 *
 * Source: resistances in line, 1 / (1 / S + 1 / S film), the film's counted by half.
 */
export function restingSurfaceMPerS(film: Film | undefined): number {
  if (film === undefined) return SURFACE_M_PER_S
  return 1 / (1 / SURFACE_M_PER_S + COUNTED_SHARE / FILM_M_PER_S[film])
}
