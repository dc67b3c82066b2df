import { Sheet } from '@/app/_components/ui/sheet'
import { STATUS_WORDS } from '@/lib/method/status'
import { titleOf } from './sections'

export function StatusWords() {
  return (
    <Sheet id="status" title={titleOf('status')} className="scroll-mt-6">
      <dl className="grid max-w-words gap-x-6 gap-y-2 sm:grid-cols-[14rem_1fr]">
        {STATUS_WORDS.map(({ status, words }) => (
          <div key={status} className="contents">
            <dt className="font-semibold max-sm:mt-2">{status}</dt>
            <dd>{words}</dd>
          </div>
        ))}
      </dl>
    </Sheet>
  )
}
