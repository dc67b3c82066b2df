import { getPieceFit, pieceFitQuerySchema } from '@/app/_server/piece-fit'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const GET = siteRoute(
  { action: 'pieces:record', params: { piece: codeSchema }, query: pieceFitQuerySchema },
  async ({ db, member, params, query, now }) => {
    const fit = await getPieceFit(db, member, params.piece, query, now)
    return fit.ok ? answer(fit.value) : fit
  },
)
