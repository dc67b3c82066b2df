'use client'

import { Checkbox } from '@/app/_components/ui/checkbox'
import { ruleSchema } from '@/lib/notices/notice'
import { channelsFor, type OwnSettings } from '@/lib/notices/own-settings'
import { ruleNames } from '@/lib/notices/rule-names'
import type { HearingChange } from './use-hearing'

/** Each rule by each channel, where one wants it otherwise than the rest. */
export function RuleChannels({ settings, change }: { settings: OwnSettings; change: HearingChange }) {
  const rules = ruleSchema.options.filter((rule) => rule !== 'test')
  const own = Object.keys(settings.rules).length
  return (
    <details className="border-t border-line pt-3">
      <summary className="min-h-11 cursor-pointer py-2 font-semibold text-heart">
        Otherwise for some rules
        {own > 0 ? <span className="font-normal text-ink-soft"> ({own} chosen)</span> : null}
      </summary>
      <ul className="divide-y divide-line">
        {rules.map((rule) => {
          const channels = channelsFor(settings, rule)
          return (
            <li
              key={rule}
              className="grid gap-x-6 py-1 sm:grid-cols-[minmax(0,1fr)_auto_auto] sm:items-center"
            >
              <span className="max-sm:pt-2">{ruleNames[rule]}</span>
              <div className="contents max-sm:flex max-sm:gap-6">
                <Checkbox
                  label="E-mail"
                  aria-label={`${ruleNames[rule]}: e-mail`}
                  checked={channels.mailOn}
                  disabled={change.pending}
                  onChange={(event) => {
                    change.act({ rules: { [rule]: { ...channels, mailOn: event.target.checked } } })
                  }}
                />
                <Checkbox
                  label="Phone"
                  aria-label={`${ruleNames[rule]}: phone`}
                  checked={channels.pushOn}
                  disabled={change.pending}
                  onChange={(event) => {
                    change.act({ rules: { [rule]: { ...channels, pushOn: event.target.checked } } })
                  }}
                />
              </div>
            </li>
          )
        })}
      </ul>
    </details>
  )
}
