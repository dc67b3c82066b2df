import { RichText } from '@/app/_components/ui/rich-text'
import { Sheet } from '@/app/_components/ui/sheet'
import { ruleSentences } from '@/lib/notices/rule-sentences'
import type { Site } from '@/lib/sites/site'

/** The rules as they stand: the same for every member, with the values that they go by. */
export function WhatIsTold({ site }: { site: Site }) {
  return (
    <Sheet title="What you are told" id="rules" aside="The same for everyone here">
      <ul className="flex flex-col divide-y divide-line">
        {ruleSentences(site).map((rule) => (
          <li key={rule.key} className="py-3 text-[18px] leading-7">
            <p className="max-w-words">
              <RichText parts={rule.words} />
            </p>
          </li>
        ))}
      </ul>
      <p className="mt-3 text-label text-ink-soft">
        Each thing is told once, and again only when it gets worse. Notices go by e-mail to those who want
        them, and stand here for everyone who may act on them.
      </p>
    </Sheet>
  )
}
