import { saltsAnswer, saltsQuerySchema } from '@/lib/bench/salts'
import { ok } from '@/lib/result'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(saltsQuerySchema, (query) => ok(saltsAnswer(query)))
