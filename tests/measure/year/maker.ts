import type { Cover } from '@/lib/pieces/piece'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import type { Chance } from './chance'
import type { ShelfBox } from './shelf'

/** The people of a simulated site: what they plan, when they go, how they heed what they are told. All invented. */

export interface YearCarry {
  readonly code: string
  readonly kind: 'planned' | 'now'
  readonly madeAt: number
  readonly plannedAt: number
  /** As first asked. */
  readonly askedMinutes: number
  cover: Extract<Cover, 'open' | 'lid-on' | 'bagged'>
  /** The page has shown its verdict to whoever planned it. */
  isSeen: boolean
  readonly boxes: readonly ShelfBox[]
  readonly isForgotten: boolean
  state: 'planned' | 'out' | 'over'
  stayMinutes: number
  leavesAt: number
  outAt: number | null
  backAt: number
  /** Not going after all. */
  isCalledOff: boolean
  /** When somebody was first told that it is ill-advised; undefined: never. */
  warnedAt: number | undefined
  /** For each box that is out, when somebody was first told to bring it in. */
  calledAt: Map<number, number>
  /** When it would come back with nobody calling. */
  ownBackAt: number
  /** When the grade of each box would be gone in truth, from when they went. */
  goneAt: readonly (number | null)[]
}

const MINUTE_MS = 60_000
export const FORGETS = 0.06
const PLANS_A_DAY = 0.65
const GOES_NOW = 0.3
const HEEDS_ADVICE = 0.75
const HEEDS_CALL = 0.95
const BAGS_IT = 0.5
const STAYS = [45, 60, 60, 90, 90, 120, 120, 180, 240, 360] as const

interface Wish {
  day: string
  timeZone: string
  nowMs: number
}

/** Carries of one working day, decided on the noon before: the plan itself is made when its time has come. */
export function wishedCarries(
  chance: Chance,
  { day, timeZone, nowMs }: Wish,
): Omit<YearCarry, 'boxes' | 'code'>[] {
  const wishes: Omit<YearCarry, 'boxes' | 'code'>[] = []
  const cover = () => chance.pick(['open', 'open', 'lid-on', 'bagged'] as const)
  const isForgotten = () => chance.happens(FORGETS)
  const make = (kind: YearCarry['kind'], madeAt: number, plannedAt: number, minutes: number): void => {
    wishes.push({
      kind,
      madeAt: Math.max(nowMs, madeAt),
      plannedAt,
      askedMinutes: minutes,
      cover: cover(),
      isForgotten: isForgotten(),
      state: 'planned',
      stayMinutes: minutes,
      leavesAt: plannedAt + (kind === 'now' ? 0 : chance.between(-5, 20) * MINUTE_MS),
      outAt: null,
      backAt: Infinity,
      isSeen: false,
      isCalledOff: false,
      warnedAt: undefined,
      calledAt: new Map(),
      ownBackAt: Infinity,
      goneAt: [],
    })
  }
  const midnight = instantOfLocalTime(day, '00:00', timeZone)
  if (chance.happens(PLANS_A_DAY)) {
    const plannedAt = midnight + Math.round(chance.between(8 * 4, 15.5 * 4)) * 15 * MINUTE_MS
    const when = chance.even()
    const ahead =
      when < 0.6
        ? chance.between(11, 20) * 60
        : when < 0.85
          ? chance.between(90, 240)
          : chance.between(10, 55)
    make('planned', plannedAt - ahead * MINUTE_MS, plannedAt, chance.pick(STAYS))
  }
  if (chance.happens(GOES_NOW)) {
    const at = midnight + Math.round(chance.between(8 * 60, 17 * 60)) * MINUTE_MS
    make('now', at, at, chance.pick([30, 60, 60, 90, 120, 180] as const))
  }
  return wishes
}

/** One to three boxes that stand in the cupboard and are not spoken for. */
export function takenBoxes(chance: Chance, shelf: readonly ShelfBox[]): ShelfBox[] {
  const free = shelf.filter((box) => !box.isTaken)
  const count = Math.min(free.length, chance.pick([1, 1, 2, 2, 3] as const))
  const taken: ShelfBox[] = []
  while (taken.length < count) {
    const box = free[Math.floor(chance.even() * free.length)]
    if (box !== undefined && !taken.includes(box)) taken.push(box)
  }
  return taken
}

/** What the maker makes of advice about a plan: most of the time it is heeded. */
export function heedAdvice(
  chance: Chance,
  carry: YearCarry,
  advice: { mark: string; earlyAt: number | null },
): void {
  if (!chance.happens(HEEDS_ADVICE)) return
  if (advice.mark === 'leave') carry.isCalledOff = true
  else if (advice.mark === 'keep-short' && advice.earlyAt !== null)
    carry.stayMinutes = Math.max(
      30,
      Math.min(carry.stayMinutes, Math.floor((advice.earlyAt - carry.plannedAt) / MINUTE_MS)),
    )
}

/** The page shows the verdict to whoever plans: now and then that leads to the better cover at once. */
export function heedPage(chance: Chance, carry: YearCarry, isLeave: boolean): void {
  carry.isSeen = true
  if (isLeave && chance.happens(BAGS_IT)) carry.cover = 'bagged'
}

/** A call while it is out: whoever hears it brings the piece in, if not at once. */
export function heedCall(chance: Chance, carry: YearCarry, nowMs: number): boolean {
  if (!chance.happens(HEEDS_CALL)) return false
  carry.backAt = Math.min(carry.backAt, nowMs + chance.between(10, 20) * MINUTE_MS)
  return true
}

/** When the maker would come back without being told: about when planned, or only the next morning. */
export function ownReturnAt(chance: Chance, carry: YearCarry, outAt: number, nextMorningAt: number): number {
  const plannedEnd = outAt + carry.stayMinutes * MINUTE_MS
  return carry.isForgotten
    ? Math.max(nextMorningAt, plannedEnd + 120 * MINUTE_MS)
    : plannedEnd + chance.between(-15, 12) * MINUTE_MS
}
