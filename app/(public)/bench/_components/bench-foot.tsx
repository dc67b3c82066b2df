import type { ReactNode } from 'react'
import { TextLink } from '@/app/_components/ui/text-link'

type BenchFootProps = {
  /** Where on the method page these figures are explained: "emc". */
  method: string
  /** The API's addresses. */
  children: ReactNode
}

/** The end of a bench page: how it is worked out, and the same by API. */
export function BenchFoot({ method, children }: BenchFootProps) {
  return (
    <div className="flex flex-col gap-2 px-4 sm:px-0">
      <p className="text-label">
        <TextLink href={`/method#${method}`} prefetch={false} className="inline-flex min-h-11 items-center">
          How these figures are worked out, with sources and limits
        </TextLink>
      </p>
      {children}
    </div>
  )
}
