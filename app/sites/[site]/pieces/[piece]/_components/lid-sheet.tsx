'use client'

import { useMemo, useState } from 'react'
import { LidView } from '@/app/_components/charts/lid-view'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Caution } from '@/app/_components/ui/caution'
import { Sheet } from '@/app/_components/ui/sheet'
import { TextLink } from '@/app/_components/ui/text-link'
import { carryCautions } from '@/lib/carry/cautions'
import { formatMoment } from '@/lib/format/times'
import type { PieceFit } from '@/lib/pieces/piece-fit'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { choiceQuery, isJoined, type LidChoice, lidPresets, seenLid, woodWords } from './lid-choice'
import { LidChoices } from './lid-choices'
import { LidYear } from './lid-year'

type LidSheetProps = { reader: Reader; pieceId: string; initial: PieceFit }

/** How the lid fits now, in another room or after a stay, and through its keep room's year. */
export function LidSheet({ reader, pieceId, initial }: LidSheetProps) {
  const [choice, setChoice] = useState<LidChoice>({ kind: 'now' })
  const [angleDeg, setAngle] = useState(30)
  const query = choiceQuery(choice)
  const { data: fit = initial } = useSiteQuery<PieceFit>({
    site: reader.site,
    area: 'pieces',
    key: ['fit', pieceId, query],
    path: `/pieces/${pieceId}/fit${query}`,
    initial: query === '' ? initial : undefined,
    keepLast: true,
  })
  const seen = useMemo(() => (isJoined(fit) ? seenLid(fit, choice) : undefined), [fit, choice])
  if (fit.lid.kind === 'words') {
    if (fit.lid.reason === 'not-a-box') return null
    return (
      <Sheet title="How the lid fits" id="lid">
        <p className="max-w-words">{fit.lid.words}</p>
        {fit.lid.reason === 'no-joint' && may(reader.role, 'pieces:change') ? (
          <p className="mt-2">
            <TextLink href={`/sites/${reader.site}/pieces/${pieceId}/edit`}>Tell its sizes</TextLink>
          </p>
        ) : null}
      </Sheet>
    )
  }
  if (!isJoined(fit)) return null
  const choices = (
    <LidChoices
      presets={lidPresets(fit)}
      rooms={fit.rooms.filter(({ place }) => place !== null)}
      choice={choice}
      onChoose={setChoice}
    />
  )
  return (
    <>
      <Sheet id="lid" title="How the lid fits">
        <div aria-live="polite">
          {seen === undefined ? (
            <p className="text-ink-soft">Being worked out.</p>
          ) : (
            <>
              <p className="text-verdict font-semibold">{seen.words}.</p>
              <p className="mt-1 max-w-words text-ink-soft">{woodWords(fit, seen.place)}</p>
            </>
          )}
        </div>
        {fit.lid.words === '' ? null : <p className="mt-2 max-w-words">{fit.lid.words}</p>}
        <SilentRooms fit={fit} reader={reader} />
        <div className="mt-5 border-t border-line pt-4">
          {seen === undefined ? (
            choices
          ) : (
            <LidView
              joint={seen.joint}
              units={reader.units}
              angleDeg={angleDeg}
              onTurn={setAngle}
              spigotOn={fit.lid.joint.spigotOn}
              choices={choices}
              other={seen.other}
              headingLevel={3}
            />
          )}
        </div>
        {fit.lid.assumed.length > 0 ? (
          <p className="mt-3 max-w-words text-label text-ink-soft">Assumed: {fit.lid.assumed.join('; ')}.</p>
        ) : null}
        <div className="mt-3">
          <Caution>{carryCautions[1]}</Caution>
        </div>
      </Sheet>
      {fit.keepRoom !== null && fit.year.length > 0 ? (
        <LidYear
          year={fit.year}
          roomName={fit.keepRoom.name}
          isAssumed={fit.isKeepRoomAssumed}
          isSnap={fit.lid.joint.clearanceMm < 0}
          units={reader.units}
        />
      ) : null}
    </>
  )
}

/** Rooms that can't be chosen, and why. */
function SilentRooms({ fit, reader }: { fit: PieceFit; reader: Reader }) {
  const silent = fit.rooms.filter(({ place }) => place === null)
  if (silent.length === 0) return null
  const now = new Date(fit.at)
  return (
    <p className="mt-2 max-w-words text-label text-ink-soft">
      {silent
        .map(({ name, readAt }) =>
          readAt === null
            ? `${name}: never read`
            : `${name}: no reading since ${formatMoment(readAt, reader.timeZone, now)}`,
        )
        .join('; ')}
      .
    </p>
  )
}
