import { ok } from '@/lib/result'
import { airAnswer, airQuerySchema } from '@/lib/bench/air'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(airQuerySchema, (query) => ok(airAnswer(query)))
