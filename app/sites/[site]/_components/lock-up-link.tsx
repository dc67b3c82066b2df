import { ButtonLink } from '@/app/_components/ui/button-link'

/** In the evening, until the day is closed: the way to the question of lock-up. */
export function LockUpLink({ base, isOut }: { base: string; isOut: boolean }) {
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-2 px-4 sm:px-0">
      <ButtonLink href={`${base}/lock-up`} className="max-sm:grow">
        Lock up
      </ButtonLink>
      <p className="text-label text-ink-soft">
        {isOut ? 'What is out, and what stays for the night.' : 'Is anything out that isn’t logged?'}
      </p>
    </div>
  )
}
