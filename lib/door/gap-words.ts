import { formatEmc, formatPoints } from '@/lib/format/figures'
import { noTellingDifferencePct } from '@/lib/notices/policy'

/** "Landing cupboard 8.5, Shop 13.6 % MC: 5.1 points apart". Points are points of % MC. */
export function gapWords(
  keep: { name: string; emcPct: number },
  room: { name: string; emcPct: number },
): string {
  const apart = Math.abs(keep.emcPct - room.emcPct)
  const words = apart < noTellingDifferencePct ? 'no telling difference' : `${formatPoints(apart)} apart`
  return `${keep.name} ${formatEmc(keep.emcPct)}, ${room.name} ${formatEmc(room.emcPct)}: ${words}`
}
