import type { RuleFlag, RuleModel } from '@/app/_components/charts/rule-model'
import type { Carry } from '@/lib/carry/carry'
import { formatCount, formatEmc, formatPoints } from '@/lib/format/figures'
import { formatMoment, formatShortMoment } from '@/lib/format/times'
import type { NowView, RuleRoom } from '@/lib/now/now-view'

type Clock = { timeZone: string; now: Date }

/** A room as a flag on the rule; a room that was never read hangs nowhere. */
export function roomFlag(room: RuleRoom, clock: Clock): RuleFlag | null {
  const { air } = room
  if (air.kind === 'never') return null
  const isStale = air.kind === 'stale'
  return {
    id: room.id,
    name: room.name,
    value: isStale
      ? `${formatEmc(air.emcPct)} at ${formatShortMoment(air.at, clock.timeZone, clock.now)}`
      : formatEmc(air.emcPct),
    emcPct: air.emcPct,
    mark: room.mark,
    tone: isStale ? 'soft' : room.isFocus ? 'heart' : 'ink',
    doubtPct: isStale ? air.emcDoubtPct : undefined,
  }
}

/** Now's moisture rule: the rooms above, what is out or about to go in brackets, all pieces on the shelf. */
export function nowRule(view: NowView, clock: Clock): RuleModel {
  const flags = view.rule.rooms.map((room) => roomFlag(room, clock)).filter((flag) => flag !== null)
  const carries = [...view.out, ...view.planned]
  return {
    flags,
    bands: view.rule.rooms.flatMap((room) =>
      room.year && room.air.kind !== 'never'
        ? [
            {
              lowPct: room.year.emcPctLow,
              highPct: room.year.emcPctHigh,
              label: yearWords(room.year.days),
            },
          ]
        : [],
    ),
    brackets: view.rule.brackets.map((bracket) => ({
      id: bracket.id,
      lowPct: bracket.lowMcPct,
      highPct: bracket.highMcPct,
      cutPct: bracket.cutMcPct,
      atPct: bracket.mcPct,
      leftToPct: bracket.isOut ? towards(bracket, thereOf(carries, bracket.id)) : undefined,
      label: bracketWords(bracket, clock),
    })),
    shelf: view.rule.shelf.map((item) => ({ ...item, id: `${item.label} ${String(item.mcPct)}` })),
    drop: dropOf(view, clock),
    sentence: ruleSentence(flags, view),
  }
}

const yearWords = (days: number): string => (days >= 330 ? 'its year' : `its ${String(days)} days`)

type Bracket = NowView['rule']['brackets'][number]

function bracketWords(bracket: Bracket, { timeZone, now }: Clock): string {
  const who = bracket.isOut ? `${bracket.number}, out` : bracket.number
  const left = bracket.leftPct < 0.05 ? 'nothing left' : `${formatPoints(bracket.leftPct)} left`
  if (bracket.earlyAt === null) return `${who}: ${left}`
  const isLate = new Date(bracket.earlyAt) <= now
  return `${who}: ${left}, ${isLate ? 'was due' : 'back by'} ${formatMoment(bracket.earlyAt, timeZone, now)}`
}

/** The EMC of the air that a piece is in or goes to. */
function thereOf(carries: readonly Carry[], pieceId: string): number | null {
  for (const carry of carries) {
    const check = carry.pieces.find((piece) => piece.id === pieceId)?.check
    if (check?.kind === 'verdict') return check.thereEmcPct
  }
  return null
}

/** The end of the bracket that the piece is moving to. */
const towards = (bracket: Bracket, thereEmcPct: number | null): number =>
  thereEmcPct !== null && thereEmcPct < bracket.mcPct ? bracket.lowMcPct : bracket.highMcPct

function dropOf(view: NowView, clock: Clock): RuleModel['drop'] {
  const soon = clock.now.getTime() + 2 * 3_600_000
  const carry = view.out[0] ?? view.planned.find((plan) => new Date(plan.plannedAt).getTime() <= soon)
  const room = view.rule.rooms.find((candidate) => candidate.id === carry?.toRoom.id)
  if (!room || room.air.kind !== 'fresh' || view.rule.brackets.length === 0) return undefined
  const { emcPct } = room.air
  const { brackets } = view.rule
  const past = brackets.filter((bracket) => emcPct > bracket.highMcPct || emcPct < bracket.lowMcPct).length
  return {
    emcPct,
    strong: `Wood left in ${room.name} ends here, given time`,
    soft: pastWords(past, brackets.length),
  }
}

function pastWords(past: number, all: number): string {
  if (past === 0) return all === 1 ? 'within its bracket' : 'within every bracket'
  if (all === 1) return 'past its bracket: it may bind'
  if (past === all) return 'past every bracket: they may bind'
  return `past ${String(past)} of ${String(all)} brackets`
}

function ruleSentence(flags: readonly RuleFlag[], view: NowView): string {
  if (flags.length === 0) return 'The moisture rule. No room has a reading yet.'
  const rooms = flags.map((flag) => `${flag.name} ${flag.value}`).join(', ')
  const out = view.rule.brackets.filter((bracket) => bracket.isOut).length
  return `The moisture rule: ${rooms}${out > 0 ? `; ${formatCount(out, 'piece')} out` : ''}.`
}

/** The keep room and the room furthest from it: what the folded rule says on a phone. */
export function furthestApart(rooms: readonly RuleRoom[]) {
  const fresh = rooms.flatMap((room) =>
    room.air.kind === 'fresh' ? [{ name: room.name, emcPct: room.air.emcPct, isFocus: room.isFocus }] : [],
  )
  const keep = fresh.find((room) => room.isFocus) ?? fresh[0]
  if (!keep) return null
  const far = fresh
    .filter((room) => room !== keep)
    .toSorted((a, b) => Math.abs(b.emcPct - keep.emcPct) - Math.abs(a.emcPct - keep.emcPct))[0]
  return far ? { keep, far } : null
}
