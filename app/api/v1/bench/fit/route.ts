import { ok } from '@/lib/result'
import { fitAnswer, fitQuerySchema } from '@/lib/bench/fit'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(fitQuerySchema, (query) => ok(fitAnswer(query)))
