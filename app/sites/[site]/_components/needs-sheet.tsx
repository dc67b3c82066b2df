import { ButtonLink } from '@/app/_components/ui/button-link'
import { Mark } from '@/app/_components/ui/mark'
import { Sheet } from '@/app/_components/ui/sheet'
import type { NowView } from '@/lib/now/now-view'

/** What wants somebody's hand, besides what is out or planned. */
export function NeedsSheet({ needs, base }: { needs: NowView['needs']; base: string }) {
  return (
    <Sheet id="needs" title="Needs you">
      <ul>
        {needs.map((need) => (
          <li
            key={need.id}
            className="flex flex-wrap items-center gap-x-6 gap-y-3 border-b border-line py-4 first:pt-0 last:border-b-0 last:pb-0"
          >
            <div className="flex min-w-0 grow basis-72 gap-4">
              <Mark kind={need.mark} size={20} className="mt-0.5" />
              <div className="min-w-0">
                <p className="font-semibold">{need.title}</p>
                <p className="text-ink-soft">{need.body}</p>
              </div>
            </div>
            <ButtonLink href={base + need.link} className="max-sm:ml-9">
              {need.linkWords}
              <span className="sr-only"> {need.title}</span>
            </ButtonLink>
          </li>
        ))}
      </ul>
    </Sheet>
  )
}
