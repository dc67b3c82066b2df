import { ok } from '@/lib/result'
import { followAnswer, followQuerySchema } from '@/lib/bench/joint'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(followQuerySchema, (query) => ok(followAnswer(query)))
