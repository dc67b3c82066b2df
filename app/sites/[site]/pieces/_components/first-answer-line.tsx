import { Callout } from '@/app/_components/ui/callout'
import { firstAnswer } from '@/lib/carry/first-answer'
import { type JointFacts, jointOfPiece, UNTOLD_JOINT } from '@/lib/carry/joint-defaults'
import { formatDuration } from '@/lib/format/times'
import type { NewPiece } from '@/lib/pieces/piece'
import type { RoomKind } from '@/lib/rooms/room'

/** A room to choose, with its air where that is freshly read. */
export type RoomWithAir = {
  id: string
  name: string
  mark: number
  kind: RoomKind
  air: { temperatureC: number; humidityPct: number } | null
}

type Answered = Pick<NewPiece, 'wood' | 'jointDiameterMm' | 'fitGrade'> & Pick<JointFacts, 'ownFigures'>

/** Only these are asked about: where boxes go to be worked on. */
const places: readonly RoomKind[] = ['shop', 'store', 'van', 'outdoor']

/** The first use of five answers: were it to go to the shop now, for how long? */
export function FirstAnswerLine({
  answers,
  here,
  rooms,
}: {
  answers: Answered
  here: RoomWithAir | undefined
  rooms: readonly RoomWithAir[]
}) {
  const there = places
    .flatMap((kind) => rooms.filter((room) => room.kind === kind))
    .find((room) => room.air !== null && room.id !== here?.id)
  if (!here?.air || !there?.air) return null
  const facts: JointFacts = { ...UNTOLD_JOINT, ...answers }
  const answer = firstAnswer(here.air, there.air, facts)
  const assumed = jointOfPiece(facts)?.assumed
  if (answer === undefined || assumed === undefined) return null
  return (
    <Callout
      mark={answer.kind === 'keeps' ? 'fine' : answer.kind}
      tone={answer.kind === 'leave' ? 'warn' : answer.kind === 'keeps' ? 'good' : 'ink'}
      title={
        answer.kind === 'keeps'
          ? `Into ${there.name}: its fit should keep there`
          : answer.kind === 'leave'
            ? `Into ${there.name}: leave it where it is`
            : `Into ${there.name}: back within ${formatDuration(answer.minutesEarly)}`
      }
    >
      <p className="text-label text-ink-soft">
        {answer.kind === 'keeps' ? '' : `More likely good for about ${formatDuration(answer.minutes)}. `}
        Assumed, so the doubt is wide: {assumed.join(', ')}, fitted in {here.name}, open in work. Put that
        right later.
      </p>
    </Callout>
  )
}
