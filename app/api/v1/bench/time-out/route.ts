import { ok } from '@/lib/result'
import { timeOutAnswer, timeOutQuerySchema } from '@/lib/bench/time-out'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(timeOutQuerySchema, (query) => ok(timeOutAnswer(query)))
