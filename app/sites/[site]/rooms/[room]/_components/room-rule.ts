import type { RuleModel, RuleShelfItem } from '@/app/_components/charts/rule-model'
import { formatEmc } from '@/lib/format/figures'
import { formatShortMoment } from '@/lib/format/times'
import type { RoomDetail } from '@/lib/rooms/room'

/**
 * A room's own rule: now, its year's middle and its year above; the other rooms beside; today's range and what wood has
 * felt below.
 */
export function roomRule(
  room: RoomDetail,
  felt: readonly RuleShelfItem[],
  timeZone: string,
  now: Date,
): RuleModel {
  const { air, year, today } = room
  const isFresh = air.kind === 'fresh'
  const flags: RuleModel['flags'] = [
    ...room.others.map((other) => ({
      id: other.id,
      name: other.name,
      value: formatEmc(other.emcPct),
      emcPct: other.emcPct,
      mark: other.mark,
      tone: 'ink' as const,
    })),
    ...(air.kind === 'never'
      ? []
      : [
          {
            id: room.id,
            name: isFresh ? `${room.name} now` : room.name,
            value: isFresh
              ? formatEmc(air.emcPct)
              : `${formatEmc(air.emcPct)} at ${formatShortMoment(air.at, timeZone, now)}`,
            emcPct: air.emcPct,
            mark: room.mark,
            tone: isFresh ? ('heart' as const) : ('soft' as const),
            doubtPct: isFresh ? undefined : air.emcDoubtPct,
          },
        ]),
  ]
  const at = air.kind === 'never' ? null : air.emcPct
  return {
    flags,
    bands: year
      ? [
          {
            lowPct: year.emcPctLow,
            highPct: year.emcPctHigh,
            label: year.days >= 330 ? 'its year' : `its ${String(year.days)} days`,
          },
        ]
      : [],
    brackets:
      today && at !== null
        ? [
            {
              id: 'today',
              lowPct: today.emcPctMin,
              highPct: today.emcPctMax,
              cutPct: year?.emcPctMiddle,
              atPct: clamp(at, today),
              label: 'today so far',
            },
          ]
        : [],
    shelf: felt,
    sentence: sentence(room, flags, felt),
  }
}

const clamp = (at: number, today: { emcPctMin: number; emcPctMax: number }) =>
  Math.min(Math.max(at, today.emcPctMin), today.emcPctMax)

function sentence(room: RoomDetail, flags: RuleModel['flags'], felt: readonly RuleShelfItem[]): string {
  if (flags.length === 0) return `${room.name} on the moisture rule: no reading yet.`
  const today = room.today
    ? `; today from ${formatEmc(room.today.emcPctMin)} to ${formatEmc(room.today.emcPctMax)}`
    : ''
  const marks = felt.length === 0 ? '' : `; ${felt.map((mark) => `${mark.label} ${mark.sub}`).join(', ')}`
  return `${room.name} on the moisture rule: ${flags.map((flag) => `${flag.name} ${flag.value}`).join(', ')}${today}${marks}.`
}
