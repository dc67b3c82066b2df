import { formatDuration } from '@/lib/format/times'

/** Lengths of stay to choose from, in minutes. */
export const stays = [30, 60, 120, 180, 240, 360, 480, 720, 1440, 4320, 10_080] as const

export function stayWords(minutes: number): string {
  if (minutes === 1440) return 'a day'
  if (minutes === 10_080) return 'a week'
  return formatDuration(minutes)
}
