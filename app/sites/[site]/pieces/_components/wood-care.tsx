import { Caution } from '@/app/_components/ui/caution'
import { DUST_ALWAYS } from '@/lib/wood/dust'
import { protectedWords } from '@/lib/wood/protected'
import type { WoodChoice } from '@/lib/wood/wood'

/** What to be careful about with a wood: its dust, its protection, its oil, with where each stands. It can't be put away. */
export function WoodCare({ wood }: { wood: WoodChoice | undefined }) {
  const dust = wood?.dust
  return (
    <div className="flex flex-col gap-2">
      <Caution>
        {dust ? (
          <>
            <strong>Dust of this wood:</strong> {dust.effect} ({dust.kind}). Source: {dust.source};{' '}
            {dust.status}.{' '}
          </>
        ) : null}
        {DUST_ALWAYS} Not medical advice. Guidance on wood dust: HSE, OSHA.
      </Caution>
      {wood?.protection ? <Caution>{protectedWords(wood.protection)}</Caution> : null}
      {wood?.oily ? (
        <Caution>An oily wood: its own moisture may differ from the curve for all woods.</Caution>
      ) : null}
    </div>
  )
}
