import { Mark, Verdict } from '@/app/_components/ui/mark'
import type { PieceCheck } from '@/lib/carry/carry-check'
import { formatUsed } from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import type { Mark as MarkKind } from '@/lib/notices/notice'

type PieceVerdictProps = {
  check: PieceCheck
  timeZone: string
  now: Date
  /** One line of why, where many verdicts stand together; the carry's own page tells all. */
  isShort?: boolean
}

/** The verdict of one piece, or the words in its place. Times told are the early edge. */
export function PieceVerdict({ check, timeZone, now, isShort = false }: PieceVerdictProps) {
  if (check.kind === 'words') {
    return (
      <div>
        <p className="text-verdict font-semibold">{check.words}</p>
        {check.second ? <p className="text-label text-ink-soft">{check.second}</p> : null}
      </div>
    )
  }
  if (check.kind === 'unknown') {
    const since = check.since === null ? '' : ` since ${formatMoment(check.since, timeZone, now)}`
    return (
      <div>
        <Verdict kind="unknown">
          {check.reason === 'no-reading' ? `No reading${since}` : 'No verdict'}
        </Verdict>
        <p className="text-label text-ink-soft">{check.words}</p>
      </div>
    )
  }
  return (
    <div>
      <Verdict kind={check.verdict}>{verdictWords(check, timeZone, now)}</Verdict>
      {isShort ? (
        <p className="text-label text-ink-soft">{shortWords(check, timeZone, now)}</p>
      ) : (
        <div className="mt-1 flex flex-col gap-1 text-label text-ink-soft">
          <p>{check.reason}</p>
          {middleWords(check, timeZone, now)}
          {check.second ? <p>{check.second}</p> : null}
          {check.assumed.length > 0 ? (
            <p>Assumed, so the doubt is wider: {check.assumed.join(', ')}.</p>
          ) : null}
        </div>
      )}
    </div>
  )
}

type VerdictCheck = Extract<PieceCheck, { kind: 'verdict' }>

function verdictWords(check: VerdictCheck, timeZone: string, now: Date): string {
  if (check.verdict !== 'keep-short' || check.earlyAt === null) return check.words
  return `${check.words}: back by ${formatMoment(check.earlyAt, timeZone, now)}`
}

function middleWords(check: VerdictCheck, timeZone: string, now: Date) {
  if (check.middleAt === null || check.usedAtStart >= 1) return null
  return <p>More likely good until about {formatMoment(check.middleAt, timeZone, now)}.</p>
}

function shortWords(check: VerdictCheck, timeZone: string, now: Date): string {
  if (check.usedAtStart >= 1) return 'It has moved past what it may lose already.'
  if (check.verdict === 'leave' && check.earlyAt !== null)
    return `What it may lose may be used up by ${formatMoment(check.earlyAt, timeZone, now)}.`
  if (check.verdict === 'keep-short' && check.middleAt !== null)
    return `More likely good until about ${formatMoment(check.middleAt, timeZone, now)}.`
  return `About ${formatUsed(check.usedAtEnd)} by the end of the stay.`.replace('About hardly', 'Hardly')
}

/** The mark that stands for a check in a list. */
export function checkMark(check: PieceCheck): MarkKind {
  if (check.kind === 'verdict') return check.verdict
  return 'unknown'
}

/** A piece with its verdict on one line: "219 leave it where it is". */
export function CheckLine({ number, check, timeZone, now }: PieceVerdictProps & { number: string }) {
  const words =
    check.kind === 'verdict'
      ? check.verdict === 'keep-short' && check.earlyAt !== null
        ? `by ${formatMoment(check.earlyAt, timeZone, now)}`
        : check.words.toLowerCase()
      : check.words
  return (
    <span className="inline-flex items-baseline gap-2">
      <Mark kind={checkMark(check)} className="translate-y-[3px]" />
      <span>
        <strong>{number}</strong> {words}
      </span>
    </span>
  )
}
