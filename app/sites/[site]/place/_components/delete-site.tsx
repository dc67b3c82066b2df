'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { ConfirmDialog } from '@/app/_components/ui/confirm-dialog'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { Sheet } from '@/app/_components/ui/sheet'
import { useAction } from '@/app/_components/use-action'
import type { Reader } from '@/lib/sites/reader'
import type { Site } from '@/lib/sites/site'

/** For good. A site of one's own asks for its name; the demo goes in one press, as nothing in it is anybody's. */
export function DeleteSite({ reader, site }: { reader: Reader; site: Site }) {
  const [isAsking, setIsAsking] = useState(false)
  const [typed, setTyped] = useState('')
  const remove = useAction<{ name: string }, unknown>({
    run: (body) => apiFetch(`/sites/${reader.site}`, { method: 'DELETE', body }),
    onDone: () => {
      // A whole load: nothing of what is gone may stay in the page's memory.
      window.location.replace(site.isDemo ? '/' : '/sites')
    },
    errors: 'inline',
  })
  const isNamed = site.isDemo || typed.trim() === site.name
  const verb = site.isDemo ? 'Remove the demo' : 'Delete the site'

  return (
    <Sheet title={verb} id="delete" edge="warn">
      <div className="flex max-w-[40rem] flex-col gap-4">
        <p className="max-w-words">
          {site.isDemo
            ? `${site.name} goes with its rooms, pieces, readings and its four accounts. Your own sites stay as they are.`
            : `${site.name} goes for good, with its rooms, sensors, readings, pieces, carries and notices. It can’t be undone. Its members keep their accounts.`}
        </p>
        {site.isDemo ? null : (
          <Field label={`Type its name to go on: ${site.name}`} error={remove.problem?.errorOf('name')}>
            <Input
              autoComplete="off"
              value={typed}
              onChange={(event) => {
                setTyped(event.target.value)
              }}
            />
          </Field>
        )}
        {remove.error && !remove.problem?.errorOf('name') ? (
          <p role="alert" className="text-warn">
            {remove.problem?.detail ??
              'No answer came. Look whether the site is still there, then try again.'}
          </p>
        ) : null}
        <Button
          className="self-start"
          notYet={isNamed ? undefined : 'Not until its name is typed.'}
          onClick={() => {
            setIsAsking(true)
          }}
        >
          {verb}
        </Button>
      </div>
      <ConfirmDialog
        open={isAsking}
        onOpenChange={setIsAsking}
        title={`${verb}?`}
        confirmLabel={verb}
        pending={remove.pending}
        onConfirm={() => {
          remove.act({ name: site.name })
        }}
      >
        <p>
          {site.isDemo
            ? 'Starting with --reset-demo makes it anew.'
            : 'Nobody can bring it back, not even us.'}
        </p>
      </ConfirmDialog>
    </Sheet>
  )
}
