/**
 * What resting pieces of the invented place weighed. Their moisture is the model's own: a fall towards an end, with what
 * the rooms have added since, and the small noise of a scale on top. Whether one is ready is left to the rule.
 */
export interface PlaceWeighings {
  number: string
  /** Oven-dry mass, g. */
  dryG: number
  /** Told to the product, from an offcut that was dried; else only its weights are known. */
  isDryMassTold: boolean
  /** Oldest first. */
  daysAgo: readonly number[]
  /** Above its end at the first weight, points of % MC. */
  startsOverPct: number
  /** In which all but a third of that goes. */
  fallsInDays: number
  /**
   * Where it ends, points of % MC over the middle of its keep room's year. Null for one that is done: it ends where the
   * season leaves it closest to that middle.
   */
  endsOverPct: number | null
  /** Something was cut away: until when the weights before it hold, and how much went. */
  cut?: { daysAgo: number; takesG: number }
}

/** Step of the place's scale, g. */
export const placeScaleStepG = 1

export const placeWeighings: readonly PlaceWeighings[] = [
  // Ready: the same for months, at the moisture of its room, rested.
  {
    number: '127',
    dryG: 968,
    isDryMassTold: true,
    daysAgo: [112, 84, 57, 29, 6],
    startsOverPct: 0.4,
    fallsInDays: 20,
    endsOverPct: null,
  },
  // Looks ready and isn't: it holds its weight, well damper than the cupboard.
  {
    number: '94',
    dryG: 918,
    isDryMassTold: true,
    daysAgo: [101, 73, 45, 17],
    startsOverPct: 0.2,
    fallsInDays: 400,
    endsOverPct: 2.6,
  },
  // On its way: the loss has slowed, and a range can be told.
  {
    number: '103',
    dryG: 356,
    isDryMassTold: true,
    daysAgo: [83, 76, 69, 62, 55, 46, 37, 27, 16, 5],
    startsOverPct: 7,
    fallsInDays: 24,
    endsOverPct: 0.2,
  },
  // Its rim was trued a month ago, so that older weights no longer compare.
  {
    number: '102',
    dryG: 415,
    isDryMassTold: false,
    daysAgo: [92, 78, 64, 50, 38, 26, 9],
    startsOverPct: 5,
    fallsInDays: 30,
    endsOverPct: 0.3,
    cut: { daysAgo: 31, takesG: 37 },
  },
  // Came in lately: two weights tell nothing yet.
  {
    number: '110',
    dryG: 329,
    isDryMassTold: false,
    daysAgo: [19, 5],
    startsOverPct: 4,
    fallsInDays: 25,
    endsOverPct: 0.2,
  },
]

/** The scale's own noise, shares of a step; the same each time. */
const NOISE = [0.2, -0.3, 0.1, 0.3, -0.1, -0.2, 0.3, 0, -0.3, 0.2] as const
const dayMs = 86_400_000
/** How far the end of one that is done may follow the season, points of % MC. */
const FOLLOWS_PCT = 0.6

/**
 * The weights of a piece, g, as its scale shows them.
 * @param middlePct middle of its keep room's year, % MC
 * @param driftAt what the rooms have added by an instant, points of % MC
 */
export function weightsOf(
  story: PlaceWeighings,
  middlePct: number,
  driftAt: (atMs: number) => number | undefined,
  now: Date,
): { at: Date; grams: number }[] {
  const { daysAgo, dryG, startsOverPct, fallsInDays, cut } = story
  const first = daysAgo[0] ?? 0
  const endPct = middlePct + (story.endsOverPct ?? -within(lastDrift(story, driftAt, now)))
  return daysAgo.map((days, n) => {
    // In the forenoon, a little later each time.
    const at = new Date(now.getTime() - days * dayMs - ((n * 37) % 90) * 60_000)
    const fallen = startsOverPct * Math.exp((days - first) / fallsInDays)
    const mcPct = endPct + fallen + (driftAt(at.getTime()) ?? 0)
    const wood = cut !== undefined && days < cut.daysAgo ? dryG - cut.takesG : dryG
    const exact = wood * (1 + mcPct / 100) + (NOISE[n % NOISE.length] ?? 0) * placeScaleStepG
    return { at, grams: Math.round(exact / placeScaleStepG) * placeScaleStepG }
  })
}

const lastDrift = (
  { daysAgo }: PlaceWeighings,
  driftAt: (atMs: number) => number | undefined,
  now: Date,
): number => driftAt(now.getTime() - (daysAgo.at(-1) ?? 0) * dayMs) ?? 0

const within = (pct: number): number => Math.max(-FOLLOWS_PCT, Math.min(FOLLOWS_PCT, pct))
