import { Sheet } from '@/app/_components/ui/sheet'
import { formatEmc, formatPoints } from '@/lib/format/figures'
import type { PieceDetail } from '@/lib/pieces/piece'
import { movedWords, quarterTurnWords, usedWords } from '@/lib/pieces/wording'
import type { UnitSystem } from '@/lib/sites/site'

/** How the lid should turn now, in the words of the quarter turn, then the figures behind them. */
export function FitSoFar({ piece, units }: { piece: PieceDetail; units: UnitSystem }) {
  const { mc } = piece
  // Blanks, wild grain and stabilised wood are not reckoned; the page's sentence says so.
  if (mc === null && (piece.stage !== 'box' || piece.woodKind === 'wild' || piece.woodKind === 'stabilised'))
    return null
  if (mc === null) {
    return (
      <Sheet title="The fit so far" id="fit">
        <p className="max-w-words text-ink-soft">
          Not worked out yet: nothing is known of the air that it has been in. A reading from its room, and it
          begins.
        </p>
      </Sheet>
    )
  }
  const isJoined = piece.stage === 'box'
  return (
    <Sheet title={isJoined ? 'The fit so far' : 'Its moisture now'} id="fit">
      <div className="grid gap-6 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <div className="flex flex-col gap-3">
          {isJoined ? <p className="text-verdict font-semibold">{quarterTurnWords(mc)}</p> : null}
          <p className="max-w-words">
            The wood at its {isJoined ? 'joint' : 'wall'} stands at about{' '}
            <strong>{formatEmc(mc.ringMcPct)}</strong>, give or take {formatPoints(mc.doubtPct)}.{' '}
            {isJoined ? movedWords(mc, units) : ''}
          </p>
          <p className="text-label text-ink-soft">
            Points are points of % MC, the moisture content of the wood.
          </p>
        </div>
        {isJoined && mc.usedFraction !== null ? <UsedBar used={mc.usedFraction} /> : null}
      </div>
    </Sheet>
  )
}

function UsedBar({ used }: { used: number }) {
  const words = usedWords(used)
  // The track ends at one and a half times the allowance, so that "past it" can be seen.
  const share = Math.min(1, used / 1.5)
  const allowanceAt = `${String((1 / 1.5) * 100)}%`
  return (
    <figure className="flex flex-col gap-1" aria-label={`Allowance: ${words}`}>
      <div aria-hidden="true" className="relative h-[26px] border border-edge bg-steel">
        <div
          className={`moves absolute inset-y-0 left-0 ${used > 1 ? 'bg-warn' : 'bg-ink'}`}
          style={{ width: `${String(share * 100)}%` }}
        />
        <div className="absolute -inset-y-1.5 w-[3px] bg-heart" style={{ left: allowanceAt }} />
      </div>
      <div aria-hidden="true" className="relative h-5 text-label">
        <span className="absolute left-0 text-ink-soft">none</span>
        <span className="absolute -translate-x-1/2 font-semibold text-heart" style={{ left: allowanceAt }}>
          all
        </span>
      </div>
      <figcaption className="first-letter:uppercase">{words}.</figcaption>
    </figure>
  )
}
