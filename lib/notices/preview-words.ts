import { formatCount } from '@/lib/format/figures'
import { type Preview, previewDays } from './preview'

/**
 * "It would have told you 4 times in the last 90 days", or what was told where it can't be run again. The moments
 * themselves stand beneath.
 * @param recordDays days of the record that there is; fewer than 90 are said
 */
export function previewWords(preview: Preview, recordDays: number): string {
  const { by, moments } = preview
  const span =
    by === 'record' && recordDays < previewDays
      ? `in the ${formatCount(recordDays, 'day')} on record`
      : `in the last ${String(previewDays)} days`
  const times = moments.length === 1 ? 'once' : `${String(moments.length)} times`
  if (by === 'told')
    return moments.length === 0
      ? `It can’t be run over the past again. It has told nothing ${span}.`
      : `It can’t be run over the past again. It told you ${times} ${span}.`
  return moments.length === 0
    ? `With these words it would have told you nothing ${span}.`
    : `With these words it would have told you ${times} ${span}.`
}
