import type { Row } from './route-row'

/** The open calculators: each asked once, with figures that it can answer. */
export const benchRows: Record<string, Row> = {
  'GET /api/v1/bench/air': bench({ temperatureC: '20', humidityPct: '50' }),
  'GET /api/v1/bench/diffusion': bench({ temperatureC: '20', mcPct: '9', densityKgM3: '680' }),
  'GET /api/v1/bench/emc': bench({ temperatureC: '20', humidityPct: '50' }),
  'GET /api/v1/bench/fit': bench({
    diameterMm: '60',
    clearanceMm: '0.1',
    angleDeg: '90',
    mcChangePct: '2',
    species: 'fraxinus-excelsior',
  }),
  'GET /api/v1/bench/follow': bench({ shape: 'slab', biot: 'inf', fourier: '0.2' }),
  'GET /api/v1/bench/humidity': bench({ temperatureC: '20', emcPct: '9' }),
  'GET /api/v1/bench/joint': bench({
    densityKgM3: '680',
    temperatureC: '15',
    mcPct: '9',
    wallMm: '2.5',
    faces: '2',
    spigotMm: '6',
    lidMm: '8',
    hours: '2',
  }),
  'GET /api/v1/bench/salts': bench({ temperatureC: '20' }),
  'GET /api/v1/bench/shop': bench({
    volumeM3: '40',
    temperatureC: '8',
    humidityPct: '85',
    targetEmcPct: '9',
  }),
  'GET /api/v1/bench/time-out': bench({
    species: 'fraxinus-excelsior',
    diameterMm: '60',
    wallMm: '2.5',
    spigotMm: '6',
    cover: 'open',
    allowanceMm: '0.08',
    fromMcPct: '8',
    toEmcPct: '16',
    temperatureC: '12',
  }),
  'GET /api/v1/bench/weighing': bench({ grams: '182.0,167.9,160.0', everyDays: '7' }),
  'GET /api/v1/bench/warming': bench({ fromC: '5', fromHumidityPct: '85', toC: '15' }),
}

function bench(query: Record<string, string>): Row {
  return { action: 'anyone', query: () => query }
}
