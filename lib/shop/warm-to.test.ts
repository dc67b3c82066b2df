import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { emcPct } from '@/lib/wood/emc'
import { referenceJson } from '@/tests/support/reference'
import { warmestShopC } from './policy'
import { dryToForEmc, warmedHumidityPct, warmToForEmc } from './warm-to'
import { waterInAirKg } from './water'

const { rooms } = z
  .object({
    rooms: z
      .array(
        z.object({
          volume_m3: z.number(),
          temp_c: z.number(),
          rh_pct: z.number(),
          emc_pct: z.number(),
          target_emc_pct: z.number(),
          warm_to_c: z.number(),
          rh_after_warming_pct: z.number(),
          or_dry_to_rh_pct: z.number(),
          water_in_air_to_remove_kg: z.number(),
        }),
      )
      .min(3),
  })
  .parse(referenceJson('worked_examples.json'))

describe('a damp shop, against worked_examples.json', () => {
  it.each(rooms)('$temp_c °C and $rh_pct % RH for $target_emc_pct % MC', (room) => {
    const air = { temperatureC: room.temp_c, humidityPct: room.rh_pct }
    const warm = warmToForEmc(air, room.target_emc_pct)
    if (!warm.ok) throw new Error(warm.error.code)
    // The file is printed to 0.01; its tolerances are 0.02 K, 0.02 % RH and 0.5 % of a mass.
    expect(Math.abs(warm.value.temperatureC - room.warm_to_c)).toBeLessThan(0.02)
    expect(Math.abs(warm.value.humidityPct - room.rh_after_warming_pct)).toBeLessThan(0.02)
    const dry = dryToForEmc(air, room.target_emc_pct)
    if (!dry.ok) throw new Error(dry.error.code)
    expect(Math.abs(dry.value - room.or_dry_to_rh_pct)).toBeLessThan(0.02)
    const kg = waterInAirKg(room.volume_m3, room.temp_c, room.rh_pct, dry.value)
    expect(Math.abs(kg / room.water_in_air_to_remove_kg - 1)).toBeLessThan(0.005)
  })
})

describe('warm to, dry to', () => {
  const air = fc.record({
    temperatureC: fc.double({ min: -10, max: 30, noNaN: true }),
    humidityPct: fc.double({ min: 10, max: 100, noNaN: true }),
  })
  const target = fc.double({ min: 3, max: 20, noNaN: true })

  it('lands on the wanted EMC with the water left as it is, or says why not', () => {
    fc.assert(
      fc.property(air, target, (shop, wanted) => {
        const warm = warmToForEmc(shop, wanted)
        if (warm.ok) {
          expect(emcPct(warm.value.temperatureC, warm.value.humidityPct)).toBeCloseTo(wanted, 4)
          expect(warm.value.temperatureC).toBeGreaterThan(shop.temperatureC)
          expect(warm.value.temperatureC).toBeLessThanOrEqual(warmestShopC)
          const back = warmedHumidityPct(warm.value, shop.temperatureC)
          expect(back).toBeCloseTo(shop.humidityPct, 6)
        } else if (warm.error.code === 'dry-enough') {
          expect(warm.error.emcPct).toBeLessThanOrEqual(wanted)
        } else expect(warm.error.emcAtWarmestPct).toBeGreaterThan(wanted)
      }),
    )
  })

  it('asks for more warmth the drier the wood is to be, and the damper the air is', () => {
    fc.assert(
      fc.property(air, target, fc.double({ min: 0.1, max: 3, noNaN: true }), (shop, wanted, less) => {
        const there = warmToForEmc(shop, wanted)
        const drier = warmToForEmc(shop, wanted - less)
        fc.pre(there.ok && drier.ok)
        if (there.ok && drier.ok) expect(drier.value.temperatureC).toBeGreaterThan(there.value.temperatureC)
        const damper = warmToForEmc({ ...shop, humidityPct: Math.min(100, shop.humidityPct + 5) }, wanted)
        if (there.ok && damper.ok)
          expect(damper.value.temperatureC).toBeGreaterThanOrEqual(there.value.temperatureC)
      }),
    )
  })

  it('dries to a humidity that holds the wanted EMC at the same temperature', () => {
    fc.assert(
      fc.property(air, target, (shop, wanted) => {
        const dry = dryToForEmc(shop, wanted)
        if (!dry.ok) return
        expect(emcPct(shop.temperatureC, dry.value)).toBeCloseTo(wanted, 5)
        expect(dry.value).toBeLessThan(shop.humidityPct)
      }),
    )
  })

  it('says that nothing is needed where wood ends dry enough, also exactly there', () => {
    const shop = { temperatureC: 20, humidityPct: 40 }
    const wanted = emcPct(20, 40)
    expect(warmToForEmc(shop, wanted)).toEqual({ ok: false, error: { code: 'dry-enough', emcPct: wanted } })
    expect(dryToForEmc(shop, wanted)).toEqual({ ok: false, error: { code: 'dry-enough', emcPct: wanted } })
    expect(warmToForEmc(shop, 29)).toMatchObject({ ok: false, error: { code: 'dry-enough' } })
  })

  it('says so where warming up to 35 °C does not do', () => {
    expect(warmToForEmc({ temperatureC: 30, humidityPct: 95 }, 6)).toMatchObject({
      ok: false,
      error: { code: 'not-by-warming' },
    })
    expect(warmToForEmc({ temperatureC: 40, humidityPct: 60 }, 6)).toMatchObject({
      ok: false,
      error: { code: 'not-by-warming' },
    })
  })

  it('names the input that is no number or out of range', () => {
    expect(() => warmToForEmc({ temperatureC: NaN, humidityPct: 50 }, 9)).toThrow(/temperatureC/)
    expect(() => warmToForEmc({ temperatureC: 8, humidityPct: 101 }, 9)).toThrow(/humidityPct/)
    expect(() => warmToForEmc({ temperatureC: 8, humidityPct: 50 }, NaN)).toThrow(/targetEmcPct/)
    expect(() => dryToForEmc({ temperatureC: 8, humidityPct: 50 }, 31)).toThrow(/targetEmcPct/)
  })
})
