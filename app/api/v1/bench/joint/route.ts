import { ok } from '@/lib/result'
import { jointAnswer, jointQuerySchema } from '@/lib/bench/joint'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(jointQuerySchema, (query) => ok(jointAnswer(query)))
