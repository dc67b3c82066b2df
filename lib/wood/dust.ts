/** Shown wherever a wood's dust is spoken of. Source: HSE Woodworking Sheet WIS30, general text. */
export const DUST_ALWAYS = 'All wood dust is harmful; not listed does not mean safe.'

const STATUS = {
  read: 'read',
  secondary: 'secondary',
  list: 'on the list; effects from memory',
  memory: 'from memory',
} as const

const SOURCES = {
  chudnoff: 'Chudnoff, Tropical Timbers of the World (Agriculture Handbook 607, 1984)',
  hansard: 'Hansard, House of Commons Written Answers, 2 August 1978, cols 390-391W',
  wis30: "HSE Woodworking Sheet WIS30 'Toxic woods' (rev. 1), Table 2",
  hansard_wis30:
    "Hansard, 2 August 1978, cols 390-391W; HSE Woodworking Sheet WIS30 'Toxic woods' (rev. 1), Table 2",
  encyclopedia: 'a timber encyclopedia page',
  trade: 'a trade page',
  general: 'general literature',
} as const

type DustRow = {
  /** A species' slug, or a genus followed by -spp. */
  readonly wood: string
  readonly effect: string
  readonly kind: 'irritant' | 'sensitiser' | 'toxic' | 'sensitiser; hardwood dust carcinogen'
  readonly status: keyof typeof STATUS
  readonly source: keyof typeof SOURCES
}

/** Not medical advice. Each row says how far it could be checked. */
export const DUST_TABLE: readonly DustRow[] = [
  {
    wood: 'dalbergia-retusa',
    effect: 'fine dust may cause dermatitis (rash like ivy poisoning)',
    kind: 'sensitiser',
    status: 'read',
    source: 'chudnoff',
  },
  {
    wood: 'pterocarpus-soyauxii',
    effect: 'sawdust may cause respiratory problems',
    kind: 'irritant',
    status: 'read',
    source: 'chudnoff',
  },
  {
    wood: 'diospyros-spp',
    effect: 'sawdust may cause dermatitis',
    kind: 'irritant',
    status: 'read',
    source: 'chudnoff',
  },
  {
    wood: 'buxus-sempervirens',
    effect: 'all parts poisonous; dust causes dermatitis',
    kind: 'irritant',
    status: 'secondary',
    source: 'trade',
  },
  {
    wood: 'laburnum-spp',
    effect: 'all parts contain the poisonous alkaloid cytisine, seeds most',
    kind: 'toxic',
    status: 'read',
    source: 'encyclopedia',
  },
  {
    wood: 'carpinus-betulus',
    effect: 'dust: skin irritation, asthma',
    kind: 'irritant',
    status: 'secondary',
    source: 'encyclopedia',
  },
  {
    wood: 'taxus-baccata',
    effect: 'toxic timber: irritation, headache, nausea, possible heart effects',
    kind: 'toxic',
    status: 'list',
    source: 'hansard_wis30',
  },
  {
    wood: 'dalbergia-melanoxylon',
    effect: 'dermatitis, sneezing, conjunctivitis',
    kind: 'sensitiser',
    status: 'secondary',
    source: 'hansard',
  },
  {
    wood: 'pericopsis-elata',
    effect: 'dermatitis, rhinitis, asthma',
    kind: 'sensitiser',
    status: 'secondary',
    source: 'hansard',
  },
  {
    wood: 'dalbergia-spp',
    effect: 'dermatitis, respiratory effects',
    kind: 'sensitiser',
    status: 'list',
    source: 'hansard_wis30',
  },
  {
    wood: 'milicia-excelsa',
    effect: 'irritant, dermatitis, asthma',
    kind: 'sensitiser',
    status: 'list',
    source: 'hansard_wis30',
  },
  {
    wood: 'tectona-grandis',
    effect: 'dermatitis, bronchial effects',
    kind: 'sensitiser',
    status: 'list',
    source: 'hansard_wis30',
  },
  {
    wood: 'mansonia-altissima',
    effect: 'irritant, splinters septic, dermatitis, heart effects',
    kind: 'toxic',
    status: 'list',
    source: 'hansard_wis30',
  },
  {
    wood: 'thuja-plicata',
    effect: 'asthma, rhinitis, dermatitis',
    kind: 'sensitiser',
    status: 'list',
    source: 'hansard_wis30',
  },
  {
    wood: 'quercus-spp',
    effect: 'sneezing, asthma, nasal cancer (hardwood dust)',
    kind: 'sensitiser; hardwood dust carcinogen',
    status: 'list',
    source: 'hansard_wis30',
  },
  {
    wood: 'fagus-spp',
    effect: 'dermatitis, eye irritation, asthma, nasal cancer (hardwood dust)',
    kind: 'sensitiser; hardwood dust carcinogen',
    status: 'list',
    source: 'hansard_wis30',
  },
  {
    wood: 'ulmus-spp',
    effect: 'irritant, dermatitis, nasal cancer (hardwood dust)',
    kind: 'irritant',
    status: 'list',
    source: 'hansard_wis30',
  },
  {
    wood: 'olea-europaea',
    effect: 'skin, eye and respiratory irritation',
    kind: 'irritant',
    status: 'list',
    source: 'hansard',
  },
  {
    wood: 'khaya-spp',
    effect: 'irritation of mucous membranes',
    kind: 'irritant',
    status: 'list',
    source: 'hansard',
  },
  { wood: 'castanea-sativa', effect: 'dermatitis', kind: 'irritant', status: 'list', source: 'hansard' },
  {
    wood: 'juglans-spp',
    effect: 'irritant, dermatitis',
    kind: 'sensitiser',
    status: 'memory',
    source: 'wis30',
  },
  {
    wood: 'millettia-laurentii',
    effect: 'splinters septic; dermatitis; nervous-system and abdominal effects',
    kind: 'irritant',
    status: 'memory',
    source: 'wis30',
  },
  {
    wood: 'peltogyne-spp',
    effect: 'irritant; nausea',
    kind: 'irritant',
    status: 'memory',
    source: 'general',
  },
  {
    wood: 'microberlinia-spp',
    effect: 'eye and skin irritation, sensitiser',
    kind: 'sensitiser',
    status: 'secondary',
    source: 'trade',
  },
]

export type DustNote = Pick<DustRow, 'effect' | 'kind'> & {
  readonly status: string
  readonly source: string
}

const BY_WOOD: ReadonlyMap<string, DustRow> = new Map(DUST_TABLE.map((row) => [row.wood, row]))

/** The row for ebony is by genus; persimmon is of that genus and is not meant by it. */
const NOT_BY_GENUS: ReadonlySet<string> = new Set(['diospyros-virginiana'])

/**
 * What is published about the dust of a wood.
 * @param slug Latin name in lower case with hyphens
 * @returns the species' own row, else its genus's; undefined where none was found, which does not mean harmless
 *   (`DUST_ALWAYS` stands beside either)
 *
 * Source: named in each row.
 */
export function dustNote(slug: string): DustNote | undefined {
  const genus = slug.split('-')[0] ?? slug
  const row = BY_WOOD.get(slug) ?? (NOT_BY_GENUS.has(slug) ? undefined : BY_WOOD.get(`${genus}-spp`))
  return (
    row && { effect: row.effect, kind: row.kind, status: STATUS[row.status], source: SOURCES[row.source] }
  )
}
