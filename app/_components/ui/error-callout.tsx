'use client'

import { describeError } from '../api'
import { Callout } from './callout'

/** What went wrong with a press, beside the button: what happened, and that nothing was lost. */
export function ErrorCallout({ error }: { error: unknown }) {
  const { title, detail } = describeError(error)
  return (
    <Callout tone="warn" mark="silent" title={title} announce>
      <p>{detail}</p>
    </Callout>
  )
}
