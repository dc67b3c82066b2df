import { capital } from '@/lib/format/capital'
import { formatEmc, formatEmcFigure, formatLength, formatPoints } from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import { formatDate, formatMoment } from '@/lib/format/times'
import type { Role } from '@/lib/sites/permissions'
import type { UnitSystem } from '@/lib/sites/site'
import { FELT_DAYS_MAX, type RoomFelt } from './felt'

/** What wood has felt of a room, in words. */

/** Below this part nothing is said of what was not heard: it is in the doubt all the same. Status: guess. */
const TOLD_SHARE = 0.1
/** Doubts closer than this are told as one, points. */
const ONE_DOUBT = 0.15
const DAY_MS = 86_400_000

const listed = (parts: readonly string[]): string =>
  parts.length < 2 ? (parts[0] ?? '') : `${parts.slice(0, -1).join(', ')} and ${parts.at(-1) ?? ''}`

/** "Ash of 4 mm here has felt 9.1 % MC so far, 10 mm 8.8 and 25 mm 8.4." Empty where the room was never read. */
export function feltSentence({ wood, felt }: RoomFelt, units: UnitSystem): TextPart[] {
  const [first, ...others] = felt
  if (first === undefined) return []
  const rest = others.map((one, n): TextPart[] => {
    const joint = n === others.length - 1 ? ' and ' : ', '
    return say`${joint}${formatLength(one.thicknessMm, units)} ${strong(formatEmcFigure(one.mcPct))}`
  })
  const opening = say`${shortName(wood.commonName)} of ${formatLength(first.thicknessMm, units)} here has felt ${strong(formatEmc(first.mcPct))} so far`
  return [...opening, ...rest.flat(), { text: '.', strong: false }]
}

/** "Ash, white (American)" is ash for short. */
const shortName = (commonName: string | null): string =>
  commonName?.split(/[,(]/)[0]?.trim() || (commonName ?? 'Wood')

/** "Give or take 0.6 points": one figure where they hardly differ. */
export function feltDoubtWords({ felt }: RoomFelt, units: UnitSystem): string {
  const doubts = felt.map((one) => one.doubtPct)
  if (doubts.length === 0) return ''
  const widest = Math.max(...doubts)
  if (widest - Math.min(...doubts) < ONE_DOUBT) return `Give or take ${formatPoints(widest)} of % MC.`
  const each = felt.map((one) => `${formatPoints(one.doubtPct)} for ${formatLength(one.thicknessMm, units)}`)
  return `Give or take, in points of % MC: ${listed(each)}.`
}

/** A share in words: "about a third". */
export function shareWords(share: number): string {
  return SHARES.find(([upTo]) => share < upTo)?.[1] ?? 'all'
}
const SHARES: readonly (readonly [number, string])[] = [
  [0.17, 'about a tenth'],
  [0.29, 'about a quarter'],
  [0.42, 'about a third'],
  [0.58, 'about half'],
  [0.71, 'about two thirds'],
  [0.87, 'most'],
  [0.97, 'nearly all'],
]

/** What of it rests on hours that nobody heard, and why. Empty where that is little. */
export function feltGapWords(
  felt: RoomFelt,
  { timeZone, units, role, now }: { timeZone: string; units: UnitSystem; role: Role; now: Date },
): string[] {
  const words: string[] = []
  if (felt.at === null) return words
  if (role === 'onlooker') words.push('From whole days, up to the end of yesterday.')
  else if (felt.completeTo !== null && felt.completeTo !== felt.at)
    words.push(
      `Nothing was heard here since ${formatMoment(felt.completeTo, timeZone, now)}. The last air is taken to hold, for three days at most, and the doubt widens by the hour.`,
    )
  const doubtful = felt.felt.filter((one) => one.unknownShare >= TOLD_SHARE)
  if (doubtful.length === 0) return words
  const shares = doubtful.map(
    (one) => `${shareWords(one.unknownShare)} of what ${formatLength(one.thicknessMm, units)} has felt`,
  )
  const why = whyUnknown(felt, doubtful, timeZone, now)
  words.push(
    `${capital(listed(shares))} ${shares.length === 1 ? 'rests' : 'rest'} on ${why}: the doubt is wider for it.`,
  )
  return words
}

/** The record that is too short for the wood, else the wood that is too slow for what is looked at, else its gaps. */
function whyUnknown(felt: RoomFelt, doubtful: RoomFelt['felt'], timeZone: string, now: Date): string {
  const memoryDays = Math.max(...doubtful.map((one) => one.memoryDays))
  if (felt.recordFrom !== null && isBeforeRecord(felt, memoryDays))
    return `the time before the record began on ${formatDate(felt.recordFrom, timeZone, now)}, or on hours without a reading`
  if (memoryDays >= FELT_DAYS_MAX)
    return `air of more than ${String(FELT_DAYS_MAX)} days ago, which is not looked at, or on hours without a reading`
  return 'hours without a reading'
}

/** Whether the wood remembers further back than the room's record goes, by more than a day. */
function isBeforeRecord({ at, recordFrom }: RoomFelt, memoryDays: number): boolean {
  if (at === null || recordFrom === null) return false
  return (new Date(at).getTime() - new Date(recordFrom).getTime()) / DAY_MS < memoryDays - 1
}
