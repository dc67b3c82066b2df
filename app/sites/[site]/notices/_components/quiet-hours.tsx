'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useRouter } from 'next/navigation'
import { useForm } from 'react-hook-form'
import { apiFetch } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { SentenceInput } from '@/app/_components/ui/sentence-control'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { TextLink } from '@/app/_components/ui/text-link'
import { useAction } from '@/app/_components/use-action'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { type Site, type SiteChange, siteChangeSchema } from '@/lib/sites/site'

const quietSchema = siteChangeSchema.pick({ quietFrom: true, quietTo: true, lockUpAt: true }).required()

export function QuietHours({ reader, site }: { reader: Reader; site: Site }) {
  const router = useRouter()
  const form = useForm({
    resolver: zodResolver(quietSchema),
    defaultValues: { quietFrom: site.quietFrom, quietTo: site.quietTo, lockUpAt: site.lockUpAt },
  })
  const save = useAction<SiteChange, Site>({
    run: (body) => apiFetch(`/sites/${reader.site}`, { method: 'PATCH', body, ifMatch: site.version }),
    invalidates: [['site', reader.site]],
    done: 'Kept',
    onDone: () => {
      // The rules above are drawn from the site that the server read.
      router.refresh()
    },
    errors: 'inline',
  })
  const { errors, isDirty } = form.formState
  const message =
    errors.quietFrom?.message ??
    errors.quietTo?.message ??
    errors.lockUpAt?.message ??
    (save.error ? (save.problem?.detail ?? 'No answer came. Nothing was changed; press again.') : undefined)

  return (
    <Sheet title="When the place is left alone" id="quiet">
      {may(reader.role, 'site:change') ? (
        <form
          noValidate
          aria-label="Quiet hours"
          className="flex flex-col gap-4"
          onSubmit={form.handleSubmit((body) => {
            save.act(body)
          })}
        >
          <FlowingSentence>
            From <SentenceInput type="time" label="Quiet hours begin" {...form.register('quietFrom')} /> to{' '}
            <SentenceInput type="time" label="Quiet hours end" {...form.register('quietTo')} />, hold
            everything except a finished box that is overdue, told once, to its maker. Lock-up is at{' '}
            <SentenceInput type="time" label="Lock-up" {...form.register('lockUpAt')} />.
          </FlowingSentence>
          {message ? (
            <p role="alert" className="text-warn">
              {message}
            </p>
          ) : null}
          <Button
            type="submit"
            variant="filled"
            pending={save.pending}
            notYet={isDirty ? undefined : 'Nothing has been changed.'}
            className="self-start"
          >
            Keep these
          </Button>
        </form>
      ) : (
        <p className="text-[18px] leading-7">
          {site.quietFrom === site.quietTo ? (
            'There are no quiet hours.'
          ) : (
            <>
              From <strong>{site.quietFrom}</strong> to <strong>{site.quietTo}</strong>, everything is held
              except a finished box that is overdue.
            </>
          )}{' '}
          An owner changes this.
        </p>
      )}
      <p className="mt-3 text-label text-ink-soft">
        These hold for everybody here who has not chosen hours of their own. What was held comes together when
        they end, the most pressing first. Who is on the house list:{' '}
        <TextLink href={`/sites/${reader.site}/place?part=place`}>People and place</TextLink>.
      </p>
    </Sheet>
  )
}
