import 'server-only'
import { SPECIES, type Species } from '@/lib/wood/species'

/** Every wood that can be chosen, by common name. The same for every site; asked for under one, as pages need it there. */
export const listSpecies = (): readonly Species[] => SPECIES
