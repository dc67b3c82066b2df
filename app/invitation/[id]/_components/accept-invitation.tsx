'use client'

import { useRouter } from 'next/navigation'
import { apiFetch } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { useAction } from '@/app/_components/use-action'
import { roleDeeds } from '@/lib/sites/role-words'
import type { Role } from '@/lib/sites/permissions'
import type { Site } from '@/lib/sites/site'

export function AcceptInvitation({ id, role }: { id: string; role: Role }) {
  const router = useRouter()
  const accept = useAction<Record<string, never>, Site>({
    run: (_input, idempotencyKey) =>
      apiFetch(`/invitations/${id}/accept`, { method: 'POST', idempotencyKey }),
    onDone: (site) => {
      router.push(`/sites/${site.id}`)
    },
    errors: 'inline',
  })
  return (
    <div className="flex flex-col items-start gap-4">
      <p>{roleDeeds[role]}</p>
      {accept.error ? (
        <p role="alert" className="text-warn">
          {accept.problem?.detail ?? 'No answer came. Nothing was changed; press again.'}
        </p>
      ) : null}
      <div className="flex flex-wrap gap-3">
        <Button
          variant="filled"
          pending={accept.pending || accept.done}
          onClick={() => {
            accept.act({})
          }}
        >
          Join
        </Button>
        <ButtonLink href="/sites" variant="quiet">
          Not now
        </ButtonLink>
      </div>
    </div>
  )
}
