import { formatEmc, formatPoints } from '@/lib/format/figures'
import { noTellingDifferencePct } from '@/lib/notices/policy'
import type { Room } from './room'

type Part = { text: string; strong: boolean }

const plain = (text: string): Part => ({ text, strong: false })
const strong = (text: string): Part => ({ text, strong: true })

/** The sentence at the top of Rooms: what can't be known first, then how far apart the driest and the dampest are. */
export function roomsHeadline(rooms: readonly Room[]): Part[] {
  if (rooms.length === 0) return [plain('No room is known here yet.')]
  const stale = rooms.filter((room) => room.air.kind === 'stale')
  const fresh = rooms
    .flatMap((room) => (room.air.kind === 'fresh' ? [{ name: room.name, emcPct: room.air.emcPct }] : []))
    .toSorted((a, b) => a.emcPct - b.emcPct)
  const missing =
    stale.length === 0
      ? []
      : [
          strong(stale.map((room) => room.name).join(' and ')),
          plain(stale.length === 1 ? ' has no fresh reading. ' : ' have no fresh reading. '),
        ]
  const dry = fresh[0]
  const damp = fresh.at(-1)
  if (!dry || !damp)
    return missing.length > 0
      ? missing
      : [plain('No room has been read yet: add a sensor, or type in what a dial says.')]
  if (dry === damp)
    return [...missing, plain(`${dry.name} brings wood to about `), strong(formatEmc(dry.emcPct)), plain('.')]
  const apart = damp.emcPct - dry.emcPct
  if (apart < noTellingDifferencePct)
    return [
      ...missing,
      plain('There is no telling difference between the rooms: about '),
      strong(formatEmc(dry.emcPct)),
      plain('.'),
    ]
  return [
    ...missing,
    plain(`${damp.name} is `),
    strong(formatPoints(apart)),
    plain(` of % MC damper than ${dry.name}: wood carried from one to the other moves.`),
  ]
}
