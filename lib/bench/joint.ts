import { z } from 'zod'
import { cylinderResponse } from '@/lib/carry/cylinder-response'
import { LONGITUDINAL_RATIO, transverseDiffusionM2PerS } from '@/lib/carry/diffusion'
import { plugLidFractionChanged, ringFractionChanged } from '@/lib/carry/joint'
import { slabResponse } from '@/lib/carry/slab-response'
import { densityKgM3, mcPct, numberIn, temperatureC, wallMm } from './query'

export const spigotMm = numberIn(0.5, 60, 'mm')
export const lidMm = numberIn(0.5, 100, 'mm')

export const jointQuerySchema = z.strictObject({
  densityKgM3,
  temperatureC,
  mcPct,
  wallMm,
  faces: z.enum(['1', '2'], { error: '1 or 2' }).transform((faces) => (faces === '1' ? 1 : 2)),
  spigotMm,
  lidMm,
  hours: numberIn(0, 100_000, 'h'),
  rim: z.enum(['open', 'shielded'], { error: 'open or shielded' }).default('open'),
})

/**
 * How far the ring and a plug lid have followed a step of the air. The lid's two faces are open whatever stands for the
 * wall.
 */
export function jointAnswer(query: z.output<typeof jointQuerySchema>): { ring: number; lid: number } {
  const wood = { densityKgM3: query.densityKgM3, temperatureC: query.temperatureC, mcPct: query.mcPct }
  const size = { wallMm: query.wallMm, spigotMm: query.spigotMm, grain: 'end-grain' } as const
  const elapsedS = query.hours * 3600
  return {
    ring: ringFractionChanged(size, { faces: query.faces, rim: query.rim }, wood)(elapsedS),
    lid: plugLidFractionChanged(query.lidMm, 2, wood)(elapsedS),
  }
}

export const followQuerySchema = z.strictObject({
  shape: z.enum(['slab', 'cylinder'], { error: 'slab or cylinder' }),
  biot: z.union([z.literal('inf').transform(() => Infinity), numberIn(0.001, 1_000_000, '')], {
    error: 'inf, or a number from 0.001 to 1000000',
  }),
  fourier: numberIn(0, 1_000_000, ''),
})

/** The step response itself. */
export function followAnswer(query: z.output<typeof followQuerySchema>): { fraction: number } {
  const response = query.shape === 'slab' ? slabResponse : cylinderResponse
  return { fraction: response(query.biot)(query.fourier) }
}

export const diffusionQuerySchema = z.strictObject({ temperatureC, mcPct, densityKgM3 })

/** The diffusion coefficient across the grain, and along it by the usual ratio. */
export function diffusionAnswer(query: z.output<typeof diffusionQuerySchema>) {
  const transverseM2PerS = transverseDiffusionM2PerS(query.temperatureC, query.mcPct, query.densityKgM3)
  return { transverseM2PerS, longitudinalM2PerS: LONGITUDINAL_RATIO * transverseM2PerS }
}
