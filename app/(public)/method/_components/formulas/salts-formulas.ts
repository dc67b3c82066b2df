import { SALTS, SALTS_MAX_C, SALTS_MIN_C } from '@/lib/air/salts'
import { exactly } from '@/lib/method/figure'
import { type FormulaFacts, polynomial } from '../formula-facts'

const NAMES: Readonly<Record<string, string>> = {
  LiCl: 'lithium chloride',
  MgCl2: 'magnesium chloride',
  'Mg(NO3)2': 'magnesium nitrate',
  NaCl: 'sodium chloride',
  KCl: 'potassium chloride',
  K2SO4: 'potassium sulphate',
}

export const saltsFormulas: readonly FormulaFacts[] = [
  {
    id: 'salt-lines',
    title: 'What a wet salt holds',
    plain:
      'In a sealed box a slush of salt and water holds one humidity, which hangs on the salt and a little on the temperature.',
    lines: SALTS.map(
      ({ salt, polynomial: terms }) => `"${NAMES[salt] ?? salt}:" H = ${polynomial(terms, 'T')}`,
    ),
    letters: 'H in % RH, T in °C.',
    source:
      'Greenspan, Humidity Fixed Points of Binary Saturated Aqueous Solutions, J. Res. NBS 81A (1977), 89-96, Table 1; magnesium nitrate and potassium sulphate from memory',
    status: 'confirmed',
    range: `${exactly(SALTS_MIN_C)} to ${exactly(SALTS_MAX_C)} °C`,
    limits:
      'Grains must stay undissolved; half a day at one steady temperature. The linear term of lithium chloride is positive, or the paper’s own table is not met',
    doubt: 'As listed beside each, from memory: ± 0.1 to 0.9 % RH',
  },
]
