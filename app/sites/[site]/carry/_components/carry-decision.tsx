'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { ErrorCallout } from '@/app/_components/ui/error-callout'
import { PageActions } from '@/app/_components/ui/page-actions'
import { useAction } from '@/app/_components/use-action'
import { problemCodeOf } from '@/lib/api/problems'
import type { Carry, NewCarry } from '@/lib/carry/carry'
import type { CarryCheckAnswer, CarryCheckRequest } from '@/lib/carry/carry-answer'
import type { Reader } from '@/lib/sites/reader'
import { AgainstAdvice } from '../../_components/against-advice'
import { someWay, type Way } from './carry-ways'

type CarryDecisionProps = {
  reader: Reader
  request: CarryCheckRequest
  answer: CarryCheckAnswer | undefined
  ways: readonly Way[]
  best: Way | undefined
  mode: 'now' | 'plan'
  /** It went some time ago: it is logged, and no advice can keep it in. */
  isLogged: boolean
  onDone: (carry: Carry) => void
}

/** What is done about it, each way in one press. The filled button is the act that best keeps the fit. */
export function CarryDecision(props: CarryDecisionProps) {
  const { reader, request, answer, ways, best, mode, isLogged, onDone } = props
  const create = useAction({
    run: (body: Partial<NewCarry>, idempotencyKey) =>
      apiFetch<Carry>(`/sites/${reader.site}/carries`, { method: 'POST', body, idempotencyKey }),
    invalidates: (['now', 'carries', 'pieces', 'rooms'] as const).map((area) => siteKey(reader.site, area)),
    done: (carry) =>
      carry.state === 'planned' ? 'It is planned, and watched' : 'It is logged out, and watched',
    errors: 'inline',
    onDone,
  })
  const [asking, setAsking] = useState(false)
  const isAdvised = create.problem !== null && problemCodeOf(create.problem) === 'advised-against'
  const isBad = answer?.worst === 'leave' && !isLogged
  // Until there is an answer no way is the best one.
  const isUnjudged = answer === undefined && !isLogged
  const others = isLogged ? [] : ways.filter((way) => way.key !== 'asked')
  const some = answer && !isLogged ? someWay(answer, request) : undefined
  const isBestOther = best !== undefined && best.key !== 'asked' && others.includes(best)
  return (
    <div className="contents sm:flex sm:flex-col sm:gap-3">
      <PageActions>
        {[...others.filter((way) => way === best), ...others.filter((way) => way !== best)].map((way) => (
          <Button
            key={way.key}
            variant={way === best ? 'filled' : 'second'}
            pending={create.pending}
            className={way === best ? undefined : 'max-sm:hidden'}
            onClick={() => {
              create.act(bodyOf(way.request, way.key === 'hour' ? 'plan' : mode, false))
            }}
          >
            {way.act}
          </Button>
        ))}
        {some ? (
          <Button
            pending={create.pending}
            className="max-sm:hidden"
            onClick={() => {
              create.act(bodyOf(some.request, mode, false))
            }}
          >
            {some.act}
          </Button>
        ) : null}
        <Button
          variant={isBestOther ? 'link' : isBad || isUnjudged ? 'second' : 'filled'}
          pending={create.pending}
          onClick={() => {
            if (isBad && mode === 'now') setAsking(true)
            else create.act(bodyOf(request, mode, false))
          }}
        >
          {goWords(request.pieceIds.length, mode, isLogged, isBad)}
        </Button>
        {isBad && !isBestOther ? (
          <p className="text-label text-ink-soft">
            Best left where {request.pieceIds.length === 1 ? 'it is' : 'they are'}. Nothing needs pressing for
            that.
          </p>
        ) : null}
      </PageActions>
      <AgainstAdvice
        open={asking || isAdvised}
        why={create.problem?.detail ?? whyNot(answer)}
        pending={create.pending}
        onCancel={() => {
          setAsking(false)
          create.reset()
        }}
        onConfirm={() => {
          setAsking(false)
          create.act(bodyOf(request, mode, true))
        }}
      />
      {create.error && !isAdvised ? <ErrorCallout error={create.error} /> : null}
    </div>
  )
}

function goWords(count: number, mode: 'now' | 'plan', isLogged: boolean, isBad: boolean): string {
  const them = count === 1 ? 'it' : 'them'
  if (mode === 'plan') return isBad ? 'Plan it as asked' : 'Plan it'
  if (isLogged) return `Log ${them} as out`
  return isBad ? `Take ${them} out as asked` : `Take ${them} out now`
}

/** The verdict against it and its reason, for each piece that should stay. */
function whyNot(answer: CarryCheckAnswer | undefined): string {
  const reasons = (answer?.pieces ?? []).flatMap(({ number, check }) =>
    check.kind === 'verdict' && check.verdict === 'leave' ? [`${number}: ${check.reason}`] : [],
  )
  return reasons.join(' ')
}

function bodyOf(request: CarryCheckRequest, mode: 'now' | 'plan', againstAdvice: boolean): Partial<NewCarry> {
  const { startsAt, pieceIds, toRoomId, stayMinutes, cover } = request
  return {
    pieceIds,
    ...(toRoomId === undefined ? {} : { toRoomId }),
    stayMinutes,
    cover,
    plannedAt: startsAt,
    startsNow: mode === 'now',
    againstAdvice,
  }
}
