import { describe, expect, it } from 'vitest'
import { resolvedOwnWood } from './site-wood'
import { findSpecies } from './species'
import { woodView } from './wood'
import {
  figuresOverTable,
  movementOfEntry,
  ownWoodEntrySchema,
  type WoodEntry,
  woodEntryOf,
  woodFiguresEntrySchema,
} from './wood-entry'
import {
  tableWords,
  woodAssumedWords,
  woodFigureWords,
  woodKnownWords,
  woodSourceWords,
  woodsSentence,
} from './wood-words'

const entry = (facts: Partial<WoodEntry>): WoodEntry => ({ ...woodEntryOf(undefined), ...facts })
const problems = (facts: Partial<WoodEntry>) =>
  (ownWoodEntrySchema.safeParse(entry(facts)).error?.issues ?? []).map((issue) => issue.path.join('.'))

describe('a wood as typed', () => {
  it('takes shrinkage as tables print it, by the same equation as the table of woods', () => {
    const ash = {
      commonName: 'Hedge ash',
      basis: 'shrinkage',
      across: '5,0',
      along: ' 8 ',
      density: '702',
    } as const
    expect(ownWoodEntrySchema.parse(entry(ash))).toEqual({
      commonName: 'Hedge ash',
      latinName: '',
      movementClass: 'medium',
      radialPerPct: 0.00172,
      tangentialPerPct: 0.00282,
      densityKgM3: 702,
      source: '',
      note: '',
    })
    expect(findSpecies('fraxinus-excelsior')).toMatchObject({
      radialPerPct: 0.00172,
      tangentialPerPct: 0.00282,
    })
  })

  it('takes the change for each point in thousandths, and nothing where only the class is known', () => {
    const typed = { commonName: 'x', across: '1.7', along: '2.8' }
    expect(ownWoodEntrySchema.parse(entry({ ...typed, basis: 'point' }))).toMatchObject({
      ...{ radialPerPct: 0.0017, tangentialPerPct: 0.0028, densityKgM3: null },
    })
    expect(ownWoodEntrySchema.parse(entry({ ...typed, basis: 'class' }))).toMatchObject({
      radialPerPct: null,
      tangentialPerPct: null,
    })
    expect(movementOfEntry({ basis: 'point', across: '1.7', along: '' })).toBeUndefined()
  })

  it.each([
    [{ commonName: '  ' }, ['commonName']],
    [{ commonName: 'x', basis: 'point', across: '1.7', along: '' }, ['along']],
    [{ commonName: 'x', basis: 'point', across: '17', along: '28' }, ['across', 'along']],
    [{ commonName: 'x', basis: 'shrinkage', across: 'five', along: '8' }, ['across']],
    [{ commonName: 'x', basis: 'shrinkage', across: '8', along: '5' }, ['along']],
    [{ commonName: 'x', density: '0.7' }, ['density']],
  ] as const)('%j is refused at %j', (facts, paths) => {
    expect(problems(facts)).toEqual(paths)
  })

  it('begins with the figures as they stand, and gives them back unchanged', () => {
    const species = findSpecies('juglans-nigra')
    if (species === undefined) throw new Error('not found')
    const begun = woodEntryOf(woodView(species, undefined))
    expect(begun).toMatchObject({ basis: 'point', across: '1.9', along: '2.74', density: '616', source: '' })
    expect(woodFiguresEntrySchema.parse(begun)).toMatchObject({
      radialPerPct: species.radialPerPct,
      tangentialPerPct: species.tangentialPerPct,
      densityKgM3: species.densityKgM3,
    })
  })

  it("stores only what differs from the table as a site's own", () => {
    const species = findSpecies('juglans-nigra')
    if (species === undefined) throw new Error('not found')
    const typed = { ...woodEntryOf(woodView(species, undefined)), density: '590' }
    expect(figuresOverTable(woodFiguresEntrySchema.parse(typed), species)).toMatchObject({
      ...{ radialPerPct: null, tangentialPerPct: null, densityKgM3: 590 },
    })
    const other = woodFiguresEntrySchema.parse({ ...typed, along: '2.9', density: '616' })
    expect(figuresOverTable(other, species)).toMatchObject({
      ...{ radialPerPct: 0.0019, tangentialPerPct: 0.0029, densityKgM3: null },
    })
  })
})

describe('a wood in words', () => {
  const view = (slug: string) => {
    const species = findSpecies(slug)
    if (species === undefined) throw new Error('not found')
    return woodView(species, undefined)
  }

  it('gives figures as they count, and "about" for those of the class', () => {
    expect(woodFigureWords(view('fraxinus-excelsior'))).toMatchObject({
      ...{ across: '1.7', along: '2.8', density: '700\u00a0kg/m³', isMovementAssumed: false },
    })
    expect(woodAssumedWords(view('fraxinus-excelsior'))).toBe('')
    expect(woodFigureWords(view('ilex-aquifolium'))).toMatchObject({
      across: 'about 1.6',
      along: 'about 4.0',
    })
    expect(woodAssumedWords(view('ilex-aquifolium'))).toBe(
      'Assumed: movement of the large class and a middling density, so the doubt is wider.',
    )
  })

  it('tells the source once', () => {
    expect(woodSourceWords(view('dalbergia-retusa'))).toBe('')
    expect(woodKnownWords(view('dalbergia-retusa'))).toBe('from memory')
    expect(woodSourceWords(view('fagus-sylvatica'))).toMatch(/^Source: Hoadley/)
  })

  it("sets the table's figures beside one's own, in either system", () => {
    const species = findSpecies('fagus-grandifolia')
    if (species === undefined) throw new Error('not found')
    expect(tableWords(species, 'metric')).toBe(
      'In the table: 1.9 mm/m across and 4.3 along the rings for each point of % MC, 720\u00a0kg/m³; read in its source. Source: Wood Handbook (FPL-GTR-190, 2010), Tables 4-3 and 13-5.',
    )
    expect(tableWords(species, 'imperial')).toContain('1.9 thou/in across')
  })

  it('counts woods, own ones and own figures apart', () => {
    const table = { isOwn: false, isOverridden: false }
    expect(woodsSentence([table, table])).toBe(
      '2 woods are in the table: none is yours yet, and all go by the published figures.',
    )
    expect(
      woodsSentence([{ isOwn: true, isOverridden: false }, table, { ...table, isOverridden: true }]),
    ).toBe('2 woods are in the table, and one more is yours; one of the table goes by your own figures.')
  })

  it('of a site says that its figures are its own', () => {
    const own = resolvedOwnWood({
      ...{
        code: 'abcdefghjk',
        overrides: null,
        commonName: 'Hedge ash',
        latinName: '',
        movementClass: 'large',
      },
      ...{ radialPerPct: null, tangentialPerPct: null, densityKgM3: 690, source: 'own scale', note: 'dense' },
      ...{ version: 1, isArchived: false },
    })
    const shown = woodView(own, { version: 1, isArchived: false })
    expect(woodEntryOf(shown)).toMatchObject({
      basis: 'class',
      density: '690',
      source: 'own scale',
      note: 'dense',
    })
    expect(woodKnownWords(shown)).toBe('your own wood, by its class')
    expect(woodAssumedWords(shown)).toMatch(/^Assumed: movement of the large class,/)
  })
})
