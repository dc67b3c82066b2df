import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { listSpecies } from '@/app/_server/species'

export const GET = siteRoute({ action: 'pieces:see' }, () =>
  answer({ items: listSpecies(), nextCursor: null }),
)
