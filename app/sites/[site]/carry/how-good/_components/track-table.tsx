import { DataTable } from '@/app/_components/ui/data-table'
import { TextLink } from '@/app/_components/ui/text-link'
import { type TrackPoint, usedInWords } from '@/lib/carry/track-record'
import { formatMoment } from '@/lib/format/times'
import { turnedWords } from '@/lib/pieces/outcome'
import type { Reader } from '@/lib/sites/reader'

/** The figures of the drawing as a table, the newest first. */
export function TrackTable({ points, reader }: { points: readonly TrackPoint[]; reader: Reader }) {
  const base = `/sites/${reader.site}`
  return (
    <DataTable
      caption="Lids that were tried after a carry"
      rows={points}
      rowKey={(point) => `${point.carryId} ${point.pieceId}`}
      columns={[
        {
          id: 'piece',
          header: 'Piece',
          phone: 'title',
          cell: (point) => <TextLink href={`${base}/pieces/${point.pieceId}`}>{point.number}</TextLink>,
        },
        {
          id: 'when',
          header: 'When',
          phone: 'line',
          cell: (point) => (
            <TextLink href={`${base}/carry/${point.carryId}`}>
              {formatMoment(point.at, reader.timeZone, new Date(reader.at))}
            </TextLink>
          ),
        },
        {
          id: 'told',
          header: 'Told',
          phone: 'line',
          cell: (point) => (point.isAgainstAdvice ? 'leave it where it is' : 'it may go'),
        },
        { id: 'used', header: 'Allowance', phone: 'line', cell: (point) => usedInWords(point.usedMiddle) },
        { id: 'turned', header: 'The lid', phone: 'line', cell: (point) => turnedWords[point.turned] },
      ]}
    />
  )
}
