'use client'

import { useState } from 'react'
import { may } from '@/lib/sites/permissions'
import type { Site } from '@/lib/sites/site'
import { apiFetch } from '../api'
import { useAction } from '../use-action'
import { ConfirmDialog } from '../ui/confirm-dialog'

/** Marks every page of the invented place. Its owner removes the whole of it from here. */
export function DemoBanner({ site }: { site: Site }) {
  const [asking, setAsking] = useState(false)
  const remove = useAction({
    run: () => apiFetch(`/sites/${site.id}`, { method: 'DELETE', ifMatch: site.version }),
    onDone: () => {
      window.location.replace('/')
    },
  })
  return (
    <aside
      aria-label="Demo"
      className="flex flex-wrap items-center gap-x-4 border-b border-edge bg-steel px-4 py-1 text-label lg:px-10"
    >
      <p>
        <strong>Demo.</strong> An invented place: nothing here comes from a real person, firm or recording.
      </p>
      {may(site.role, 'site:delete') ? (
        <button
          type="button"
          onClick={() => {
            setAsking(true)
          }}
          className="min-h-11 text-heart underline underline-offset-4"
        >
          Remove the demo
        </button>
      ) : null}
      <ConfirmDialog
        open={asking}
        onOpenChange={setAsking}
        title="Remove the demo?"
        confirmLabel="Remove the demo"
        cancelLabel="Keep the demo"
        pending={remove.pending}
        onConfirm={() => {
          remove.act(undefined)
        }}
      >
        <p>
          {site.name} goes, with its rooms, pieces and readings. Your own places stay as they are. Starting
          Lidfast with <code>--reset-demo</code> makes it anew.
        </p>
      </ConfirmDialog>
    </aside>
  )
}
