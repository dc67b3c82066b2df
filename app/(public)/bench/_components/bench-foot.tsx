import { TextLink } from '@/app/_components/ui/text-link'
import { ApiTwins, type Twin } from './api-twin'

type BenchFootProps = {
  /** Where on the method page these figures are explained: "emc". */
  method: string
  /** None where the inputs are refused. */
  twins: readonly Twin[]
}

/** The end of a bench page: how it is worked out, and the same by API. */
export function BenchFoot({ method, twins }: BenchFootProps) {
  return (
    <div className="flex flex-col gap-2 px-4 sm:px-0">
      <p className="text-label">
        <TextLink href={`/method#${method}`} prefetch={false} className="inline-flex min-h-11 items-center">
          How these figures are worked out, with sources and limits
        </TextLink>
      </p>
      <ApiTwins twins={twins} />
    </div>
  )
}
