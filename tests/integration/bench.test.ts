import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { RouteHandler } from '@/app/_server/route'
import { problemSchema } from '@/lib/api/problems'
import { forgetServer, serverEnvironment } from '../support/server-modules'

let routes: Record<string, RouteHandler> = {}
beforeAll(async () => {
  // Nothing here may touch the database: there is none at this address.
  serverEnvironment({ DATABASE_URL: 'postgres://nobody@127.0.0.1:1/none' })
  routes = {
    emc: (await import('@/app/api/v1/bench/emc/route')).GET,
    humidity: (await import('@/app/api/v1/bench/humidity/route')).GET,
    air: (await import('@/app/api/v1/bench/air/route')).GET,
    warming: (await import('@/app/api/v1/bench/warming/route')).GET,
    fit: (await import('@/app/api/v1/bench/fit/route')).GET,
    joint: (await import('@/app/api/v1/bench/joint/route')).GET,
    'time-out': (await import('@/app/api/v1/bench/time-out/route')).GET,
    follow: (await import('@/app/api/v1/bench/follow/route')).GET,
    diffusion: (await import('@/app/api/v1/bench/diffusion/route')).GET,
    salts: (await import('@/app/api/v1/bench/salts/route')).GET,
    weighing: (await import('@/app/api/v1/bench/weighing/route')).GET,
    shop: (await import('@/app/api/v1/bench/shop/route')).GET,
  }
})
afterAll(forgetServer)

async function ask(address: string): Promise<{ response: Response; text: string }> {
  const name = address.split('?')[0] ?? ''
  const handler = routes[name]
  if (handler === undefined) throw new Error(`no route ${name}`)
  const request = new Request(`http://127.0.0.1:3000/api/v1/bench/${address}`)
  const response = await handler(request, { params: Promise.resolve({}) })
  return { response, text: await response.text() }
}

const good: Record<string, string> = {
  emc: 'temperatureC=20&humidityPct=50',
  humidity: 'temperatureC=20&emcPct=9',
  air: 'temperatureC=20&humidityPct=0',
  warming: 'fromC=20&fromHumidityPct=80&toC=-10',
  fit: 'diameterMm=60&clearanceMm=0.2&angleDeg=0&mcChangePct=4&species=acer-saccharum',
  joint: 'densityKgM3=700&temperatureC=10&mcPct=11&wallMm=4&faces=2&spigotMm=6&lidMm=8&hours=0',
  'time-out':
    'species=fraxinus-excelsior&diameterMm=62&wallMm=4&spigotMm=6&cover=closed&allowanceMm=5&fromMcPct=8.5&toEmcPct=8.5&temperatureC=10',
  follow: 'shape=cylinder&biot=inf&fourier=0',
  diffusion: 'temperatureC=-10&mcPct=30&densityKgM3=1400',
  salts: 'temperatureC=35',
  weighing: 'grams=182.0,167.9,160.0&everyDays=7',
  shop: 'volumeM3=40&temperatureC=8&humidityPct=20&targetEmcPct=9',
}

describe.each(Object.entries(good))('GET /api/v1/bench/%s', (name, query) => {
  it('answers without an account, for an hour’s caching, without null or NaN', async () => {
    const { response, text } = await ask(`${name}?${query}`)
    expect(response.status, text).toBe(200)
    expect(response.headers.get('content-type')).toContain('application/json')
    expect(response.headers.get('cache-control')).toBe('public, max-age=3600')
    expect(text).not.toMatch(/null|NaN/)
  })

  it('refuses a key that it does not know, and names it', async () => {
    const { response, text } = await ask(`${name}?${query}&site=1`)
    const problem = problemSchema.parse(JSON.parse(text))
    expect(response.status).toBe(400)
    expect(response.headers.get('content-type')).toContain('application/problem+json')
    expect(response.headers.get('cache-control')).toBe('no-store')
    expect(problem.errors?.map((error) => error.path)).toContain('site')
  })

  it('refuses to answer without its query', async () => {
    expect((await ask(name)).response.status).toBe(400)
  })
})

describe('the bench over HTTP', () => {
  it('gives 9.27 % MC for 20 °C and 50 % RH', async () => {
    const { text } = await ask('emc?temperatureC=20&humidityPct=50')
    const answer = JSON.parse(text) as { emcPct: number }
    expect(answer.emcPct).toBeCloseTo(9.27, 2)
  })

  it.each(['NaN', '', '120', '50,5', 'Infinity'])(
    'refuses humidityPct=%s with field, range and unit',
    async (value) => {
      const { response, text } = await ask(`emc?temperatureC=20&humidityPct=${value}`)
      expect(response.status).toBe(400)
      expect(problemSchema.parse(JSON.parse(text)).errors).toEqual([
        { path: 'humidityPct', message: 'a number from 0 to 100 % RH' },
      ])
    },
  )

  it('understands wood that is too wet for any air, and says that it is not possible', async () => {
    const { response, text } = await ask('humidity?temperatureC=20&emcPct=29.9')
    expect(response.status).toBe(422)
    expect(problemSchema.parse(JSON.parse(text)).errors?.[0]?.path).toBe('emcPct')
  })

  it('gives the end of three weights, and refuses weights that have none', async () => {
    const { text } = await ask('weighing?grams=182.0,167.9,160.0&everyDays=7')
    expect(JSON.parse(text)).toMatchObject({
      finalGrams: expect.closeTo(149.93, 2),
      timeConstantDays: expect.closeTo(12.08, 2),
    })
    const refused = await ask('weighing?grams=182,190,188&everyDays=7')
    expect(refused.response.status).toBe(422)
    expect(problemSchema.parse(JSON.parse(refused.text)).errors?.[0]?.path).toBe('grams')
  })

  it('says to what a damp shop is to be warmed or dried, and leaves that out for a dry one', async () => {
    const { text } = await ask('shop?volumeM3=40&temperatureC=8&humidityPct=85&targetEmcPct=9')
    expect(JSON.parse(text)).toMatchObject({
      warmToC: expect.closeTo(16.74, 2),
      humidityAfterWarmingPct: expect.closeTo(47.83, 2),
      dryToHumidityPct: expect.closeTo(47.01, 2),
      waterInAirKg: expect.closeTo(0.1256, 3),
    })
    const dry = JSON.parse((await ask(`shop?${good.shop ?? ''}`)).text) as Record<string, unknown>
    expect(dry.isDryEnough).toBe(true)
    expect(Object.keys(dry)).not.toContain('warmToC')
    expect(Object.keys(dry)).not.toContain('dryToHumidityPct')
  })

  it('leaves out the limit where there is none', async () => {
    const { text } = await ask(`fit?${good.fit ?? ''}`)
    expect(JSON.parse(text)).toMatchObject({ limited: false })
    expect(text).not.toContain('allowedMcChangePct')
  })
})
