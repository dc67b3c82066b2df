'use client'

import { useState } from 'react'
import { apiFetch, describeError } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { Callout } from '@/app/_components/ui/callout'
import { PageActions } from '@/app/_components/ui/page-actions'
import { useAction } from '@/app/_components/use-action'
import { problemCodeOf } from '@/lib/api/problems'
import type { Carry, NewCarry } from '@/lib/carry/carry'
import type { CarryCheckAnswer, CarryCheckRequest } from '@/lib/carry/carry-check'
import type { Reader } from '@/lib/sites/reader'
import { AgainstAdvice } from '../../_components/against-advice'

type CarryDecisionProps = {
  reader: Reader
  request: CarryCheckRequest
  answer: CarryCheckAnswer | undefined
  mode: 'now' | 'plan'
  /** It went some time ago: it is logged, and no advice can keep it in. */
  isLogged: boolean
  isBaggedBetter: boolean
  onBagged: () => void
  onDone: (carry: Carry) => void
}

/** What is done about it. The filled button is the act that best keeps the fit. */
export function CarryDecision(props: CarryDecisionProps) {
  const { reader, request, answer, mode, isLogged, isBaggedBetter, onBagged, onDone } = props
  const create = useAction({
    run: (body: Partial<NewCarry>, idempotencyKey) =>
      apiFetch<Carry>(`/sites/${reader.site}/carries`, {
        method: 'POST',
        body,
        idempotencyKey,
      }),
    invalidates: [
      siteKey(reader.site, 'now'),
      siteKey(reader.site, 'carries'),
      siteKey(reader.site, 'pieces'),
      siteKey(reader.site, 'rooms'),
    ],
    done: mode === 'plan' ? 'It is planned, and watched' : 'It is logged out, and watched',
    errors: 'inline',
    onDone,
  })
  const [asking, setAsking] = useState(false)
  const isAdvised = create.problem !== null && problemCodeOf(create.problem) === 'advised-against'
  const isBad = answer?.worst === 'leave' && !isLogged
  const goWords = mode === 'plan' ? 'Plan it' : isLogged ? 'Log it as out' : 'Take it out now'
  return (
    <div className="contents sm:flex sm:flex-col sm:gap-3">
      <PageActions>
        {isBad && isBaggedBetter ? (
          <Button variant="filled" onClick={onBagged}>
            Take it bagged instead
          </Button>
        ) : null}
        <Button
          variant={isBad ? 'second' : 'filled'}
          pending={create.pending}
          onClick={() => {
            if (isBad && mode === 'now') setAsking(true)
            else create.act(bodyOf(request, mode, false))
          }}
        >
          {goWords}
        </Button>
        {isBad && !isBaggedBetter ? (
          <p className="text-label text-ink-soft">Best left where it is. Nothing needs pressing for that.</p>
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
      {create.error && !isAdvised ? (
        <Callout tone="warn" mark="silent" title={describeError(create.error).title} announce>
          <p>{describeError(create.error).detail}</p>
        </Callout>
      ) : null}
    </div>
  )
}

/** The verdict against it and its reason, for each piece that should stay. */
function whyNot(answer: CarryCheckAnswer | undefined): string {
  const reasons = (answer?.pieces ?? []).flatMap(({ number, check }) =>
    check.kind === 'verdict' && check.verdict === 'leave' ? [`${number}: ${check.reason}`] : [],
  )
  return reasons.join(' ')
}

function bodyOf(request: CarryCheckRequest, mode: 'now' | 'plan', againstAdvice: boolean): Partial<NewCarry> {
  const { startsAt, ...rest } = request
  return { ...rest, plannedAt: startsAt, startsNow: mode === 'now', againstAdvice }
}
