/** What to know about a wood's figures, by slug. */
export const SPECIES_NOTES: Readonly<Record<string, string>> = {
  'fagus-sylvatica': 'A trade page gives 5.7 and 11.6 % shrinkage.',
  'quercus-robur-petraea': 'The figure is for white oaks; European oak is often quoted lower.',
  'acer-pseudoplatanus': 'The middle of a printed range.',
  'taxus-baccata': 'Density as printed; 640 to 680 is often quoted.',
  'laburnum-anagyroides': 'No shrinkage published; said to shrink strongly, so counted as large movement.',
  'ilex-aquifolium': 'No shrinkage found; counted as large movement, as American holly.',
  'buxus-sempervirens': 'Densities from 900 to 1100 are printed.',
  'platanus-x-hispanica': 'No shrinkage found; counted as medium movement.',
  'olea-europaea': 'Sources conflict; fit it as a wood of large movement.',
  'carpinus-betulus': 'The middle of a printed range.',
  'guaiacum-officinale': 'Very slow to follow the air.',
  'dalbergia-melanoxylon': 'Very slow to follow the air.',
  'dalbergia-stevensonii': 'Shrinkage "unusually low", no figures printed; counted as small movement.',
  'millettia-laurentii': 'Saturates early (22 % MC), so it may move a third more than this figure.',
  'berchemia-zeyheri': 'No shrinkage found; counted as medium movement.',
  'dalbergia-decipularis': 'No shrinkage found; counted as small movement, with caution.',
  'dalbergia-cearensis': 'No shrinkage found; counted as small movement, with caution.',
  'lagarostrobos-franklinii': 'Densities of 520 and 560 are printed.',
  'castanea-sativa': 'Figure for the genus.',
  'acer-spp': 'Average of the genus.',
  'fraxinus-excelsior': 'The genus is printed with 5.2 and 8.3 % shrinkage (Hoadley 1998), a little more.',
  'prunus-avium': 'The genus is printed with 4.2 and 7.8 % shrinkage (Hoadley 1998), less than here.',
  'pterocarpus-soyauxii': 'Movement in service is called very small (Chudnoff 1984).',
  'peltogyne-spp': 'Shrinkages from 3 and 6 % to 4.6 and 6.6 % are printed.',
  'guibourtia-spp': 'Trade pages give 6.0 and 8.2 % shrinkage.',
  'diospyros-crassiflora': 'From green to 12 % MC 5.5 and 6.5 % shrinkage are printed (Chudnoff 1984).',
  'microberlinia-brazzavillensis': 'A trade page gives 7.6 and 10.8 % shrinkage.',
  'swietenia-macrophylla': 'The genus is also printed with 3.2 and 5.1 % shrinkage (Hoadley 1998).',
  'tectona-grandis': 'A tangential shrinkage of 5.4 % is also printed (Govorcin and others, 2010).',
}

/**
 * Oily, dense woods take up less water than the average curve says and saturate earlier; the figures for them are on
 * the cautious side. Source: fibre saturation of 22 to 23 % in CIRAD sheets; Chudnoff (1984) on cocobolo.
 */
export const OILY_SPECIES: ReadonlySet<string> = new Set([
  'dalbergia-melanoxylon',
  'dalbergia-retusa',
  'dalbergia-nigra',
  'dalbergia-latifolia',
  'dalbergia-stevensonii',
  'dalbergia-decipularis',
  'dalbergia-cearensis',
  'guaiacum-officinale',
  'tectona-grandis',
  'millettia-laurentii',
])

/**
 * Woods whose density was recalled and not read, whatever the standing of their movement. Many are the specific gravity
 * of the Wood Handbook's Table 5-3 times 1120, from memory.
 */
export const DENSITY_FROM_MEMORY: ReadonlySet<string> = new Set([
  'fraxinus-americana',
  'fagus-sylvatica',
  'fagus-grandifolia',
  'quercus-robur-petraea',
  'quercus-alba',
  'quercus-rubra',
  'acer-saccharum',
  'acer-rubrum',
  'prunus-serotina',
  'juglans-nigra',
  'ilex-opaca',
  'malus-sylvestris',
  'platanus-occidentalis',
  'ulmus-americana',
  'swietenia-macrophylla',
  'khaya-spp',
  'betula-alleghaniensis',
  'robinia-pseudoacacia',
  'diospyros-virginiana',
  'berchemia-zeyheri',
])

/**
 * Other names that a wood is asked for by, in lower case. Status: common practice, from memory; they serve the search and
 * nothing else.
 */
export const OTHER_NAMES: Readonly<Record<string, string>> = {
  'acer-pseudoplatanus': 'great maple',
  'acer-saccharum': 'rock maple',
  'berchemia-zeyheri': 'red ivory',
  'buxus-sempervirens': 'box',
  'castanea-sativa': 'spanish chestnut',
  'cordia-spp': 'cordia',
  'dalbergia-cearensis': 'violetwood',
  'dalbergia-latifolia': 'east indian rosewood, sonokeling',
  'dalbergia-melanoxylon': 'grenadilla, mpingo',
  'dalbergia-nigra': 'rio rosewood, jacaranda',
  'diospyros-crassiflora': 'gaboon ebony',
  'guibourtia-spp': 'kevazingo',
  'khaya-spp': 'acajou',
  'microberlinia-brazzavillensis': 'zebrawood',
  'milicia-excelsa': 'kambala',
  'pericopsis-elata': 'kokrodua',
  'platanus-occidentalis': 'lacewood',
  'platanus-x-hispanica': 'lacewood',
  'platymiscium-spp': 'macacauba',
  'prunus-avium': 'gean, wild cherry',
  'pterocarpus-soyauxii': 'padouk',
  'robinia-pseudoacacia': 'false acacia',
  'swietenia-macrophylla': 'honduras mahogany, caoba',
  'tilia-spp': 'linden, basswood',
}
