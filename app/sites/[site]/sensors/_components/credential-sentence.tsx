'use client'

import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import type { SensorCredential } from '@/lib/sensors/sensor'
import { publishLine } from '@/lib/sensors/wording'
import { CopyText } from './copy-text'

/** How the sensor gets in, with the secret that nobody will see again. */
export function CredentialSentence({ credential }: { credential: SensorCredential }) {
  const { broker, signInName, secret, topic } = credential
  return (
    <>
      <FlowingSentence>
        It reaches <CopyText text={`${broker.host}:${String(broker.port)}`} what="the broker’s address" />,
        signs in as <CopyText text={signInName} what="the sign-in name" /> with the secret{' '}
        <CopyText text={secret} what="the secret" /> and publishes to{' '}
        <CopyText text={topic} what="the address to publish to" />.
      </FlowingSentence>
      <p className="text-label text-ink-soft">
        The secret is shown this once and kept only in a form that can’t be read back. Lost it? Renew it on
        the sensor’s page.
      </p>
      <div className="flex flex-col gap-2">
        <p className="text-label font-semibold">To try it from a terminal</p>
        <CopyText text={publishLine(credential, secret)} what="the line for a terminal" isBlock />
      </div>
    </>
  )
}
