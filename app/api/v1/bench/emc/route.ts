import { ok } from '@/lib/result'
import { emcAnswer, emcQuerySchema } from '@/lib/bench/emc'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(emcQuerySchema, (query) => ok(emcAnswer(query)))
