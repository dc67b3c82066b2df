'use client'

import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { SentenceInput, SentenceSelect } from '@/app/_components/ui/sentence-control'
import { Sheet } from '@/app/_components/ui/sheet'
import { Switch } from '@/app/_components/ui/switch'
import { useAction } from '@/app/_components/use-action'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import type { Notice } from '@/lib/notices/notice'
import { digestSchema, type Hearing } from '@/lib/notices/own-settings'
import type { Reader } from '@/lib/sites/reader'
import { AwayLine } from './away-line'
import { OwnQuiet } from './own-quiet'
import { PhoneLine } from './phone-line'
import { RuleChannels } from './rule-channels'
import { useHearing } from './use-hearing'

const weekdays = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday']

/** By what the reader hears of things, when, and who hears in their stead. Each choice is kept as it is made. */
export function HearingSheet({
  reader,
  initial,
  timeZones,
}: {
  reader: Reader
  initial: Hearing
  timeZones: readonly string[]
}) {
  const { hearing, change } = useHearing(reader.site, initial)
  const { settings } = hearing
  return (
    <Sheet
      title="How you hear of it"
      id="hearing"
      aside="Yours alone"
      action={<TestButton site={reader.site} />}
    >
      <div className="flex flex-col gap-5">
        <div className="flex max-w-[40rem] items-center justify-between gap-4">
          <span>By e-mail, all that is due as one mail</span>
          <Switch
            label="E-mail"
            checked={settings.mailOn}
            disabled={change.pending}
            onCheckedChange={(mailOn) => {
              change.act({ mailOn })
            }}
          />
        </div>
        <PhoneLine reader={reader} hearing={hearing} change={change} />
        <FlowingSentence className="border-t border-line pt-3">
          What can wait comes{' '}
          <SentenceSelect
            label="When what can wait comes"
            value={settings.digest}
            onChange={(event) => {
              const digest = digestSchema.safeParse(event.target.value)
              if (digest.success) change.act({ digest: digest.data })
            }}
          >
            <option value="none">as it happens</option>
            <option value="daily">together, once a day</option>
            <option value="weekly">together, once a week</option>
          </SentenceSelect>
          {settings.digest === 'weekly' ? (
            <>
              {' '}
              on{' '}
              <SentenceSelect
                label="Day of the week"
                value={settings.digestWeekday}
                onChange={(event) => {
                  change.act({ digestWeekday: Number(event.target.value) })
                }}
              >
                {weekdays.map((day, index) => (
                  <option key={day} value={index + 1}>
                    {day}
                  </option>
                ))}
              </SentenceSelect>
            </>
          ) : null}
          {settings.digest === 'none' ? null : (
            <>
              {' '}
              at{' '}
              <SentenceInput
                key={settings.digestAt}
                type="time"
                label="Time of the digest"
                defaultValue={settings.digestAt}
                onBlur={(event) => {
                  const digestAt = event.target.value
                  if (digestAt !== '' && digestAt !== settings.digestAt) change.act({ digestAt })
                }}
              />
            </>
          )}
          . What presses never waits for that.
        </FlowingSentence>
        <OwnQuiet
          key={`quiet ${String(settings.version)}`}
          settings={settings}
          change={change}
          timeZones={timeZones}
        />
        <AwayLine
          key={`away ${String(settings.version)}`}
          reader={reader}
          hearing={hearing}
          change={change}
        />
        <RuleChannels settings={settings} change={change} />
        <p className="border-t border-line pt-3 text-label text-ink-soft">
          {hearing.houseList.length === 0
            ? 'Nobody is on the house list: “can’t, tell the next” has nobody to tell.'
            : `The house list, in the order in which they are told: ${hearing.houseList
                .map(({ name, isYou }) => (isYou ? `${name} (you)` : name))
                .join(', ')}.`}
        </p>
      </div>
    </Sheet>
  )
}

/** Something that asks for nothing, by each way that is on. Its log stands with it in the list. */
function TestButton({ site }: { site: string }) {
  const send = useAction<Record<string, never>, Notice>({
    run: (_body, idempotencyKey) =>
      apiFetch(`/sites/${site}/notices/test`, { method: 'POST', body: {}, idempotencyKey }),
    invalidates: [siteKey(site, 'notices')],
    done: 'A test is on its way. It stands first among what you were told.',
  })
  return (
    <Button
      variant="link"
      pending={send.pending}
      onClick={() => {
        send.act({})
      }}
    >
      Send me a test
    </Button>
  )
}
