'use client'

import { TextLink } from '@/app/_components/ui/text-link'
import { tools } from './tools'
import { useUnits, withUnits } from './use-units'

/** Each tool by the question that it answers. */
export function ToolList() {
  const [units] = useUnits()
  return (
    <dl className="border-t border-ink max-sm:mx-4">
      {tools.map(({ path, name, question }) => (
        <div
          key={path}
          className="grid gap-x-8 border-b border-line py-2 sm:grid-cols-[minmax(0,10rem)_minmax(0,1fr)] sm:items-center"
        >
          <dt>
            <TextLink
              href={withUnits(path, units)}
              className="inline-flex min-h-11 items-center text-[18px] font-semibold"
            >
              {name}
            </TextLink>
          </dt>
          <dd className="text-[18px] max-sm:pb-2">{question}</dd>
        </div>
      ))}
    </dl>
  )
}
