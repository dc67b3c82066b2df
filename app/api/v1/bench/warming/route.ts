import { ok } from '@/lib/result'
import { warmingAnswer, warmingQuerySchema } from '@/lib/bench/air'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(warmingQuerySchema, (query) => ok(warmingAnswer(query)))
