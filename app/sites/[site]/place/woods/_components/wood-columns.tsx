import type { Column } from '@/app/_components/ui/data-table'
import { TextLink } from '@/app/_components/ui/text-link'
import type { Reader } from '@/lib/sites/reader'
import { type Wood, woodStatusWords } from '@/lib/wood/wood'
import { perPointUnit, woodAssumedWords, woodFigureWords } from '@/lib/wood/wood-words'
import { PutWoodAway } from './put-wood-away'

/** What the list of woods shows of each. */
export function woodColumns(
  reader: Reader,
  onPutAway: ((wood: Wood) => void) | undefined,
): readonly Column<Wood>[] {
  const unit = perPointUnit[reader.units]
  const columns: Column<Wood>[] = [
    { id: 'wood', header: 'Wood', phone: 'title', cell: (wood) => <WoodName wood={wood} /> },
    { id: 'class', header: 'Movement', phone: 'line', cell: (wood) => wood.movementClass },
    {
      id: 'across',
      header: `Across the rings, ${unit}`,
      align: 'right',
      phone: 'line',
      cell: (wood) => woodFigureWords(wood).across,
    },
    {
      id: 'along',
      header: `Along the rings, ${unit}`,
      align: 'right',
      phone: 'line',
      cell: (wood) => woodFigureWords(wood).along,
    },
    {
      id: 'density',
      header: 'Density',
      align: 'right',
      phone: 'line',
      cell: (wood) => woodFigureWords(wood).density,
    },
    { id: 'known', header: 'How it is known', phone: 'bare', cell: (wood) => <HowKnown wood={wood} /> },
  ]
  if (onPutAway === undefined) return columns
  return [
    ...columns,
    {
      id: 'change',
      header: 'Change',
      phone: 'bare',
      cell: (wood) => <ChangeLinks reader={reader} wood={wood} onPutAway={onPutAway} />,
    },
  ]
}

function WoodName({ wood }: { wood: Wood }) {
  const marks = [
    wood.isOwn ? 'yours' : '',
    wood.isOverridden ? 'your figures' : '',
    wood.protection ? 'protected' : '',
    wood.dust ? 'dust: see note' : '',
    wood.oily ? 'oily' : '',
  ].filter(Boolean)
  return (
    <span className="flex flex-col">
      <span className="font-semibold">{wood.commonName}</span>
      <span className="text-label text-ink-soft italic">{wood.latinName}</span>
      {marks.length > 0 ? <span className="text-label font-normal">{marks.join(', ')}</span> : null}
    </span>
  )
}

function HowKnown({ wood }: { wood: Wood }) {
  const density =
    wood.densityStatus !== undefined && wood.densityStatus !== wood.status
      ? `Density: ${woodStatusWords[wood.densityStatus]}.`
      : ''
  const notes = [
    wood.source === '' ? '' : `${wood.source}.`,
    density,
    woodAssumedWords(wood),
    wood.note ?? '',
    wood.dust ? `Dust: ${wood.dust.effect} (${wood.dust.source}; ${wood.dust.status}).` : '',
    wood.protection
      ? `${wood.protection.listing} (${wood.protection.status}, ${wood.protection.checkedOn}).`
      : '',
  ].filter(Boolean)
  return (
    <span className="flex max-w-[26rem] flex-col text-label">
      <span>{woodStatusWords[wood.status]}</span>
      <span className="text-ink-soft">{notes.join(' ')}</span>
    </span>
  )
}

type ChangeLinksProps = { reader: Reader; wood: Wood; onPutAway: (wood: Wood) => void }

function ChangeLinks({ reader, wood, onPutAway }: ChangeLinksProps) {
  const words = wood.isOwn ? 'Change' : wood.isOverridden ? 'Change your figures' : 'Your own figures'
  return (
    <span className="flex flex-wrap items-center gap-x-4 sm:flex-col sm:items-start">
      <TextLink
        href={`/sites/${reader.site}/place/woods/${wood.slug}`}
        className="inline-flex min-h-11 items-center"
      >
        {words} <span className="sr-only">for {wood.commonName}</span>
      </TextLink>
      {wood.isOwn || wood.isOverridden ? (
        <PutWoodAway site={reader.site} wood={wood} onPutAway={onPutAway} />
      ) : null}
    </span>
  )
}
