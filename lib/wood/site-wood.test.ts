import { describe, expect, it } from 'vitest'
import { CLASS_MOVEMENT, movementOfWood, UNKNOWN_DENSITY_KG_M3, woodMovement } from './movement-class'
import { newSiteWoodSchema, resolveWood, type SiteWood, siteWoodChangeSchema } from './site-wood'
import { findSpecies } from './species'
import { woodView } from './wood'

const row = (facts: Partial<SiteWood>): SiteWood => ({
  code: 'hedgeashab',
  overrides: null,
  commonName: 'Hedge ash',
  latinName: 'Fraxinus excelsior',
  movementClass: 'large',
  radialPerPct: null,
  tangentialPerPct: null,
  densityKgM3: null,
  source: '',
  note: '',
  version: 1,
  isArchived: false,
  ...facts,
})
const overAsh = (facts: Partial<SiteWood>) =>
  row({ code: 'overashabc', overrides: 'fraxinus-excelsior', movementClass: 'medium', ...facts })
const figures = { radialPerPct: 0.0021, tangentialPerPct: 0.0034 }

describe('which figures count', () => {
  it("takes a site's own wood by its code, and by no other site's", () => {
    const woods = [row(figures)]
    expect(resolveWood('own-hedgeashab', woods)).toMatchObject({
      commonName: 'Hedge ash',
      status: 'site',
      ...figures,
    })
    expect(resolveWood('own-hedgeashab', [])).toBeUndefined()
    expect(movementOfWood(resolveWood('own-hedgeashab', woods))).toMatchObject({
      ...figures,
      densityKgM3: UNKNOWN_DENSITY_KG_M3,
      assumed: ['density'],
      status: 'site',
    })
  })

  it('falls back on the class of an own wood without figures, and names that', () => {
    const movement = movementOfWood(resolveWood('own-hedgeashab', [row({ densityKgM3: 690 })]))
    expect(movement.differencePerPct).toBe(CLASS_MOVEMENT.large.differencePerPct)
    expect(movement).toMatchObject({ densityKgM3: 690, movementDoubt: 0.4, assumed: ['movement'] })
  })

  it("puts the site's figures over those of the table, and leaves the rest", () => {
    const woods = [overAsh({ ...figures, source: 'own measurements, 2026' })]
    expect(movementOfWood(resolveWood('fraxinus-excelsior', woods))).toMatchObject({
      ...figures,
      densityKgM3: 702,
      status: 'site',
    })
    expect(resolveWood('fraxinus-excelsior', woods)).toMatchObject({
      source: 'own measurements, 2026',
      densityStatus: 'secondary',
    })
    expect(resolveWood('fraxinus-americana', woods)).toEqual(findSpecies('fraxinus-americana'))
    const onlyDensity = resolveWood('fraxinus-excelsior', [overAsh({ densityKgM3: 640 })])
    expect(onlyDensity).toMatchObject({ densityKgM3: 640, densityStatus: 'site', status: 'secondary' })
    expect(movementOfWood(onlyDensity).tangentialPerPct).toBe(0.00282)
  })

  it('drops figures that were put away, and keeps a put-away wood for what was made of it', () => {
    expect(resolveWood('fraxinus-excelsior', [overAsh({ ...figures, isArchived: true })])).toEqual(
      findSpecies('fraxinus-excelsior'),
    )
    expect(resolveWood('own-hedgeashab', [row({ isArchived: true })])?.commonName).toBe('Hedge ash')
  })

  it('reckons the same by the slug as by the wood, and takes what is not known as unknown', () => {
    for (const slug of ['juglans-nigra', 'laburnum-anagyroides', 'quercus-imaginaria'])
      expect(woodMovement(slug), slug).toEqual(movementOfWood(resolveWood(slug, [])))
    expect(resolveWood(null, [])).toBeUndefined()
    expect(movementOfWood(undefined).assumed).toEqual(['wood', 'movement', 'density'])
  })
})

describe('a wood as shown', () => {
  it("carries the dust, oil and protection of an own wood's Latin name", () => {
    const wood = resolveWood('own-hedgeashab', [
      row({ commonName: 'Fence post', latinName: 'Dalbergia sissoo' }),
    ])
    if (wood === undefined) throw new Error('not found')
    const view = woodView(wood, { version: 3, isArchived: false })
    expect(view).toMatchObject({ isOwn: true, isOverridden: false, oily: true, version: 3 })
    expect(view.dust?.effect).toContain('dermatitis')
    expect(view.protection).toMatchObject({ status: 'from memory', checkedOn: '2026-12-01' })
  })
})

describe('what may be sent', () => {
  const problems = (input: unknown) =>
    (newSiteWoodSchema.safeParse(input).error?.issues ?? []).map((issue) => issue.path.join('.'))

  it.each([
    [{ commonName: 'Hedge ash' }, []],
    [{ commonName: 'Hedge ash', latinName: 'Fraxinus excelsior', ...figures, densityKgM3: 700 }, []],
    [{ overrides: 'fraxinus-excelsior', ...figures }, []],
    [{}, ['commonName']],
    [{ commonName: ' ' }, ['commonName']],
    [{ overrides: 'fraxinus-excelsior', commonName: 'My ash' }, ['commonName']],
    [{ commonName: 'x', radialPerPct: 0.002 }, ['tangentialPerPct']],
    [{ commonName: 'x', tangentialPerPct: 0.002 }, ['radialPerPct']],
    [{ commonName: 'x', radialPerPct: 0.003, tangentialPerPct: 0.002 }, ['tangentialPerPct']],
    [{ commonName: 'x', radialPerPct: 0.17, tangentialPerPct: 0.28 }, ['radialPerPct', 'tangentialPerPct']],
    [{ commonName: 'x', densityKgM3: 0.7 }, ['densityKgM3']],
    [{ commonName: 'x', latinName: '<b>' }, ['latinName']],
    [{ commonName: 'x', code: 'chosen' }, ['']],
  ])('%j: %j', (input, paths) => {
    expect(problems(input)).toEqual(paths)
  })

  it('changes any fact by itself, and nothing else', () => {
    expect(siteWoodChangeSchema.safeParse({ note: 'from the hedge' }).success).toBe(true)
    expect(siteWoodChangeSchema.safeParse({ overrides: 'fraxinus-excelsior' }).success).toBe(false)
  })
})
