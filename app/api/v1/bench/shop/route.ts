import { shopAnswer, shopQuerySchema } from '@/lib/bench/shop'
import { ok } from '@/lib/result'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(shopQuerySchema, (query) => ok(shopAnswer(query)))
