import type { Column } from '@/app/_components/ui/data-table'
import { TextLink } from '@/app/_components/ui/text-link'
import type { Reader } from '@/lib/sites/reader'
import { protectedWords } from '@/lib/wood/protected'
import { type Wood, woodStatusWords } from '@/lib/wood/wood'
import {
  perPointUnit,
  woodAssumedWords,
  woodFigureWords,
  woodKnownWords,
  woodSourceWords,
} from '@/lib/wood/wood-words'
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
  const { densityStatus, dust, protection } = wood
  const density =
    densityStatus !== undefined && densityStatus !== wood.status
      ? `Density: ${woodStatusWords[densityStatus]}.`
      : ''
  const known = [woodSourceWords(wood), density, woodAssumedWords(wood)].filter(Boolean).join(' ')
  const notes = [
    wood.note ?? '',
    dust ? `Dust: ${dust.effect} (${dust.kind}). Source: ${dust.source}; ${dust.status}.` : '',
    protection ? protectedWords(protection) : '',
    wood.oily ? 'Oily: its own moisture may differ from the curve for all woods.' : '',
  ].filter(Boolean)
  return (
    <div className="max-w-[26rem] text-label">
      <p>{woodKnownWords(wood)}</p>
      {known ? <p className="text-ink-soft">{known}</p> : null}
      {notes.length > 0 ? (
        <details>
          <summary className="inline-flex min-h-11 cursor-pointer items-center text-heart underline underline-offset-4 sm:min-h-9">
            Notes and cautions<span className="sr-only"> for {wood.commonName}</span>
          </summary>
          {notes.map((note) => (
            <p key={note} className="text-ink-soft">
              {note}
            </p>
          ))}
        </details>
      ) : null}
    </div>
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
