import { describe, expect, it } from 'vitest'
import { referenceRows, type ReferenceRow } from '@/tests/support/reference'
import { DUST_TABLE, dustNote } from './dust'
import { CLASS_MOVEMENT, UNKNOWN_DENSITY_KG_M3, woodMovement } from './movement-class'
import { findSpecies, SPECIES, speciesSlug } from './species'
import { DENSITY_FROM_MEMORY, OILY_SPECIES, OTHER_NAMES, SPECIES_NOTES } from './species-notes'

const printed = referenceRows('species.csv')
const numberOrUndefined = (row: ReferenceRow, column: string): number | undefined =>
  row.text(column) === '' ? undefined : row.number(column)

describe('species, against species.csv', () => {
  it.each(printed.map((row) => [row.text('latin_name'), row] as const))('%s', (latinName, row) => {
    const species = findSpecies(speciesSlug(latinName))
    expect(species).toMatchObject({
      latinName,
      commonName: row.text('common_name'),
      movementClass: row.text('movement_class'),
      status: row.text('status'),
    })
    expect(species?.densityKgM3).toBe(numberOrUndefined(row, 'density_12_kg_m3'))
    expect(species?.radialPerPct).toBe(numberOrUndefined(row, 'cr_per_pct'))
    expect(species?.tangentialPerPct).toBe(numberOrUndefined(row, 'ct_per_pct'))
    const isRecalled = /density from memory/.test(`${row.text('source')} ${row.text('note')}`)
    const densityStatus = isRecalled ? 'from memory' : row.text('status')
    expect(species?.densityStatus).toBe(species?.densityKgM3 === undefined ? undefined : densityStatus)
    expect(species?.source).not.toBe('')
  })

  it.each(
    printed
      .map((row) => [row.text('latin_name'), row.text('note')] as const)
      .map(
        ([name, note]) =>
          [name, note.replace(/density from memory( \(.*?\))?/, '').replace(/^\W+/, '')] as const,
      )
      .filter(([, note]) => note !== '' && !/^(use )?class (small|medium|large)$/.test(note)),
  )('tells what the file notes of %s: %s', (latinName) => {
    expect(findSpecies(speciesSlug(latinName))?.note).toBeDefined()
  })

  it('holds no wood that the file does not, and each slug once', () => {
    expect(SPECIES).toHaveLength(printed.length)
    expect(new Set(SPECIES.map((species) => species.slug)).size).toBe(printed.length)
  })

  it('keeps notes, marks and other names only for woods that exist', () => {
    const slugs = [
      ...Object.keys(SPECIES_NOTES),
      ...Object.keys(OTHER_NAMES),
      ...OILY_SPECIES,
      ...DENSITY_FROM_MEMORY,
    ]
    for (const slug of slugs) expect(findSpecies(slug), slug).toBeDefined()
  })

  it('writes slugs as Latin names in lower case with hyphens', () => {
    expect(speciesSlug('Fraxinus excelsior')).toBe('fraxinus-excelsior')
    expect(speciesSlug('Khaya spp.')).toBe('khaya-spp')
    expect(speciesSlug('Quercus robur/petraea')).toBe('quercus-robur-petraea')
  })

  it('moves more along the rings than across them, and is in the class of its sum', () => {
    for (const { slug, radialPerPct, tangentialPerPct } of SPECIES) {
      if (radialPerPct === undefined || tangentialPerPct === undefined) continue
      expect(tangentialPerPct, slug).toBeGreaterThan(radialPerPct)
    }
  })
})

describe('movement of a wood', () => {
  it.each(referenceRows('movement_classes.csv').map((row) => [row.text('movement_class'), row] as const))(
    'class %s is as derived',
    (movementClass, row) => {
      expect(Object.entries(CLASS_MOVEMENT)).toContainEqual([
        movementClass,
        {
          radialPerPct: row.number('cr_per_pct'),
          tangentialPerPct: row.number('ct_per_pct'),
          differencePerPct: row.number('ct_minus_cr_for_warnings'),
        },
      ])
    },
  )

  it('takes an unknown wood as medium, 0.0019 with 40 % doubt and 650 kg/m³, and says so', () => {
    for (const slug of [undefined, 'quercus-imaginaria']) {
      const movement = woodMovement(slug)
      expect(movement.differencePerPct).toBeCloseTo(0.0019, 10)
      expect(movement.tangentialPerPct - movement.radialPerPct).toBeCloseTo(0.0019, 10)
      expect(movement.movementDoubt).toBe(0.4)
      expect(movement.densityKgM3).toBe(650)
      expect(movement.assumed).toEqual(['wood', 'movement', 'density'])
    }
  })

  it('takes a known wood from its row', () => {
    expect(woodMovement('acer-saccharum')).toMatchObject({
      radialPerPct: 0.00165,
      tangentialPerPct: 0.00353,
      densityKgM3: 706,
      assumed: [],
    })
    expect(woodMovement('acer-saccharum').differencePerPct).toBeCloseTo(0.00188, 10)
  })

  it('names what it had to assume: movement from the class, density as a middling figure', () => {
    expect(woodMovement('laburnum-anagyroides')).toMatchObject({ densityKgM3: 860, assumed: ['movement'] })
    expect(woodMovement('laburnum-anagyroides').differencePerPct).toBe(CLASS_MOVEMENT.large.differencePerPct)
    expect(woodMovement('tilia-spp')).toMatchObject({
      densityKgM3: UNKNOWN_DENSITY_KG_M3,
      assumed: ['density'],
    })
  })
})

describe('dust notes, against wood_dust_hazards.csv', () => {
  const listed = referenceRows('wood_dust_hazards.csv').filter((row) => row.text('latin_name') !== '')

  it.each(listed.map((row) => [row.text('latin_name'), row] as const))('%s', (latinName, row) => {
    expect(dustNote(speciesSlug(latinName))).toMatchObject({
      effect: row.text('effect'),
      kind: row.text('kind'),
    })
  })

  it('holds every listed wood and no other', () => {
    expect(DUST_TABLE).toHaveLength(listed.length)
  })

  it('finds a wood by its genus, and nothing for one not listed', () => {
    expect(dustNote('quercus-alba')?.effect).toContain('asthma')
    expect(dustNote('dalbergia-nigra')?.effect).toContain('respiratory')
    expect(dustNote('fraxinus-excelsior')).toBeUndefined()
    expect(dustNote('diospyros-virginiana')).toBeUndefined()
  })
})
