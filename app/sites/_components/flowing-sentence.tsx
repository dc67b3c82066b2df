import type { ComponentProps } from 'react'
import { classNames } from '@/app/_components/ui/class-names'

/** A sentence whose controls stand within its words, so that it breaks like any other and keeps its commas. */
export function FlowingSentence({ className, ...rest }: ComponentProps<'div'>) {
  return (
    <div
      {...rest}
      className={classNames(
        'text-[18px] leading-[3.25rem] sm:text-[19px] sm:leading-[3rem] [&_input]:leading-6 [&_input]:placeholder:text-ink-soft [&_select]:leading-6',
        className,
      )}
    />
  )
}
