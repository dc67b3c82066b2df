'use client'

import { ControlSentence } from '@/app/_components/ui/sentence-control'
import type { SensorCredential } from '@/lib/sensors/sensor'
import { publishLine } from '@/lib/sensors/wording'
import { CopyText } from './copy-text'

/** How the sensor gets in, with the secret that nobody will see again. */
export function CredentialSentence({ credential }: { credential: SensorCredential }) {
  const { broker, signInName, secret, topic } = credential
  return (
    <>
      <ControlSentence>
        <span>It reaches</span>
        <CopyText text={`${broker.host}:${String(broker.port)}`} what="the broker’s address" />
        <span>, signs in as</span>
        <CopyText text={signInName} what="the sign-in name" />
        <span>with the secret</span>
        <CopyText text={secret} what="the secret" />
        <span>and publishes to</span>
        <CopyText text={topic} what="the address to publish to" />
        <span>.</span>
      </ControlSentence>
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
