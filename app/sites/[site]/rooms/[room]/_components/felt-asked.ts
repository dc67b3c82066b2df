import { FELT_THICKNESS_MAX_MM, FELT_THICKNESS_MIN_MM } from '@/lib/follow/felt'
import { FELT_THICKNESSES_MM } from '@/lib/rooms/felt'
import { woodIdSchema } from '@/lib/wood/site-wood'

/** Whose felt EMC is asked for: what stands in the page's address. */
export type FeltAsked = { wood: string | null; ownMm: number | null }

/** The course on the page goes back this far: a wall turns within it, and its days can still be told apart. */
const DAYS = 30

export const isThickness = (mm: number): boolean => mm >= FELT_THICKNESS_MIN_MM && mm <= FELT_THICKNESS_MAX_MM

type Given = string | string[] | null | undefined

/** What the address asks for; whatever can't be is passed over. */
export function feltAskedOf(wood: Given, thicknessMm: Given): FeltAsked {
  const asked = woodIdSchema.safeParse(wood)
  const ownMm = typeof thicknessMm === 'string' && thicknessMm !== '' ? Number(thicknessMm) : Number.NaN
  return { wood: asked.success ? asked.data : null, ownMm: isThickness(ownMm) ? ownMm : null }
}

/** The query of the API for it: the three thicknesses of the rule, and one of one's own. */
export function feltQueryOf({ wood, ownMm }: FeltAsked): Record<string, string> {
  const thicknesses = ownMm === null ? FELT_THICKNESSES_MM : [...FELT_THICKNESSES_MM, ownMm]
  return {
    thicknessMm: thicknesses.join(','),
    days: String(DAYS),
    ...(wood === null ? {} : { wood }),
  }
}
