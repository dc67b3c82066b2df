'use client'

import { Fragment, useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { classNames } from '@/app/_components/ui/class-names'
import { Switch } from '@/app/_components/ui/switch'
import { useAction } from '@/app/_components/use-action'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { formatDate } from '@/lib/format/times'
import { ruleNames } from '@/lib/notices/rule-names'
import { enteredValue } from '@/lib/notices/rule-units'
import type { RuleValue } from '@/lib/notices/rule-settings'
import {
  type ControlView,
  type RuleList,
  type RuleView,
  type RuleWish,
  valuesOfView,
} from '@/lib/notices/rule-view'
import type { Reader } from '@/lib/sites/reader'
import { RulePreviewLine } from './rule-preview-line'
import { controlWords, RuleWord, textOfNumber } from './rule-word'

type RuleLineProps = {
  reader: Reader
  rule: RuleView
  rooms: RuleList['rooms']
  mayChange: boolean
}

/** What stands in the fields: numbers as typed, the rest as values. */
type Draft = Record<string, RuleValue>

/** One rule: its sentence, on or off, and when it would have spoken. */
export function RuleLine({ reader, rule, rooms, mayChange }: RuleLineProps) {
  const controls = rule.parts.flatMap((part) => ('control' in part ? [part.control] : []))
  const [draft, setDraft] = useState<Draft>(() => draftOf(controls, reader))
  const [isOpen, setIsOpen] = useState(false)
  const change = useAction<RuleWish, RuleView>({
    run: (body) =>
      apiFetch(`/sites/${reader.site}/rules`, {
        method: 'PATCH',
        body: { rule: rule.rule, ...body },
        ifMatch: rule.version,
      }),
    invalidates: [siteKey(reader.site, 'notices', 'rules')],
  })
  const undo = useAction<Record<string, never>, RuleView>({
    run: () =>
      apiFetch(`/sites/${reader.site}/rules/undo`, {
        method: 'POST',
        body: { rule: rule.rule },
        ifMatch: rule.version,
      }),
    invalidates: [siteKey(reader.site, 'notices', 'rules')],
  })
  const values = valuesIn(draft, controls, reader)
  const wrong = controls.find((control) => isOutOfRange(control, values[control.key]))
  const isChanged = JSON.stringify(values) !== JSON.stringify(valuesOfView(rule))

  return (
    <li className="flex flex-col gap-2 py-3">
      <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-2 sm:flex-nowrap">
        <FlowingSentence className={classNames('min-w-0 max-w-words', !rule.isOn && 'text-ink-soft')}>
          {rule.parts.map((part, index) =>
            'text' in part ? (
              <Fragment key={index}>{part.text}</Fragment>
            ) : mayChange ? (
              <RuleWord
                key={index}
                control={part.control}
                value={draft[part.control.key] ?? part.control.value}
                units={reader.units}
                rooms={rooms}
                isWrong={wrong?.key === part.control.key}
                onChange={(value) => {
                  setDraft({ ...draft, [part.control.key]: value })
                  setIsOpen(true)
                }}
              />
            ) : (
              <strong key={index}>{controlWords(part.control, reader.units, rooms)}</strong>
            ),
          )}
        </FlowingSentence>
        {mayChange ? (
          <Switch
            label={`Tell of this: ${ruleNames[rule.rule]}`}
            checked={rule.isOn}
            disabled={change.pending}
            onCheckedChange={(isOn) => {
              change.act({ isOn })
            }}
          />
        ) : (
          <span className="font-semibold">{rule.isOn ? 'On' : 'Off'}</span>
        )}
      </div>
      {wrong ? (
        <p role="alert" className="text-warn">
          {wrong.label}: {rangeWords(wrong, reader)}.
        </p>
      ) : null}
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        {isChanged ? (
          <>
            <Button
              variant="filled"
              pending={change.pending}
              notYet={wrong ? 'One of the words is out of its range.' : undefined}
              onClick={() => {
                change.act({ settings: values })
              }}
            >
              Keep these words
            </Button>
            <Button
              onClick={() => {
                setDraft(draftOf(controls, reader))
              }}
            >
              Leave as it was
            </Button>
          </>
        ) : null}
        <Button
          variant="link"
          aria-expanded={isOpen}
          onClick={() => {
            setIsOpen(!isOpen)
          }}
        >
          {isOpen ? 'Close' : 'What it would have told'}
        </Button>
        {rule.lastChange ? (
          <span className="text-label text-ink-soft">
            Changed by {rule.lastChange.by ?? 'somebody who has left'},{' '}
            {formatDate(rule.lastChange.at, reader.timeZone, new Date(reader.at))}.{' '}
            {mayChange && rule.lastChange.canUndo ? (
              <Button
                variant="link"
                pending={undo.pending}
                onClick={() => {
                  undo.act({})
                }}
              >
                Undo
              </Button>
            ) : null}
          </span>
        ) : null}
      </div>
      {isOpen && !wrong ? <RulePreviewLine reader={reader} rule={rule.rule} settings={values} /> : null}
    </li>
  )
}

const draftOf = (controls: readonly ControlView[], reader: Reader): Draft =>
  Object.fromEntries(
    controls.map((control) => [control.key, textOfNumber(control, reader.units) ?? control.value]),
  )

/** The draft in SI. */
function valuesIn(draft: Draft, controls: readonly ControlView[], reader: Reader): Record<string, RuleValue> {
  return Object.fromEntries(
    controls.map((control) => {
      const value = draft[control.key] ?? control.value
      if (control.kind !== 'number' || typeof value !== 'string') return [control.key, value]
      return [control.key, enteredValue(value, control.unit, reader.units, Number(control.value))]
    }),
  )
}

function isOutOfRange(control: ControlView, value: RuleValue | undefined): boolean {
  if (control.kind === 'time') return typeof value !== 'string' || value === ''
  if (control.kind !== 'number') return false
  return typeof value !== 'number' || !(value >= control.min && value <= control.max)
}

function rangeWords(control: ControlView, reader: Reader): string {
  if (control.kind !== 'number') return 'say a time'
  const shown = (value: number) => textOfNumber({ ...control, value }, reader.units) ?? ''
  return `between ${shown(control.min)} and ${shown(control.max)}`
}
