import type { SteadyCarry } from '@/lib/carry/steady-carry'
import { formatDuration } from '@/lib/format/times'
import { noTellingDifferencePct } from '@/lib/notices/policy'

/** What the figure says, in a sentence that a maker could act on. */
export function LandingStory({ carry, minutes }: { carry: SteadyCarry; minutes: number | undefined }) {
  return (
    <p className="text-[19px] leading-7 sm:text-[22px] sm:leading-8">
      {minutes === undefined ? (
        <>Weeks in this shop bring it here. </>
      ) : minutes < 1 ? (
        <>It has only just come from the house. </>
      ) : (
        <>
          <strong>{formatDuration(minutes)}</strong> in this shop, open in work,{' '}
          {minutes < 1.5 ? 'bring' : 'brings'} it here.{' '}
        </>
      )}
      {/* Only this is read out when it changes: the time follows every step of the handle. */}
      <span aria-live="polite">
        <Advice carry={carry} minutes={minutes} />
      </span>
    </p>
  )
}

function Advice({ carry, minutes }: { carry: SteadyCarry; minutes: number | undefined }) {
  const { timeOut } = carry
  if (!timeOut.binds) {
    return Math.abs(carry.shopEmcPct - carry.houseEmcPct) < noTellingDifferencePct ? (
      <>Between these two rooms there is no telling difference.</>
    ) : (
      <>Even given time, its lid should keep its fit there.</>
    )
  }
  const keepTo = <strong>{formatDuration(timeOut.minutesEarly)}</strong>
  if (minutes !== undefined && minutes <= timeOut.minutesEarly) {
    return <>The lid should still turn; keep it to {keepTo}, because by then 1 in 10 like it may bind.</>
  }
  if (minutes !== undefined && minutes <= timeOut.minutes) {
    return <>The lid may bind by now: more than 1 in 10 like it would. Bring it back within {keepTo}.</>
  }
  return <>By now its lid more likely binds than turns. Bring it back within {keepTo}.</>
}
