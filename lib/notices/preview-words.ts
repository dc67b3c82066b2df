import { formatCount } from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import { type Preview, previewDays } from './preview'

/** How many moments a sentence names before it only counts. */
const namedMax = 4

/**
 * "It would have told you 4 times in the last 90 days: Tue 3 Nov, 07:10, …", or what was told where it can't be run
 * again.
 * @param recordDays days of the record that there is; fewer than 90 are said
 */
export function previewWords(
  preview: Preview,
  recordDays: number,
  clock: { timeZone: string; now: Date },
): string {
  const { by, moments } = preview
  const span =
    by === 'record' && recordDays < previewDays
      ? `in the ${formatCount(recordDays, 'day')} on record`
      : `in the last ${String(previewDays)} days`
  const times = moments.length === 1 ? 'once' : `${String(moments.length)} times`
  const named = moments
    .slice(-namedMax)
    .map(({ at }) => formatMoment(new Date(at), clock.timeZone, clock.now))
  const list =
    moments.length === 0 ? '' : `${moments.length > namedMax ? ', lately' : ''}: ${named.join('; ')}`
  if (by === 'told')
    return moments.length === 0
      ? `It can’t be run over the past again. It has told nothing ${span}.`
      : `It can’t be run over the past again. It told you ${times} ${span}${list}.`
  return moments.length === 0
    ? `With these words it would have told you nothing ${span}.`
    : `With these words it would have told you ${times} ${span}${list}.`
}
