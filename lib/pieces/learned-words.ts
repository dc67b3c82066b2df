import type { MovementClass } from '@/lib/wood/species'
import { formatCount } from '@/lib/format/figures'

/** What a site's own lids have told of how quickly such wood follows the air. */
export type Learned = {
  readonly movementClass: MovementClass
  /** On the diffusion of the formula. */
  readonly factor: number
  readonly outcomes: number
}

/** Nearer to 1 than this is no difference. Status: guess. */
const ALIKE = 0.05

/** "Wood of medium movement follows about 1.2 × as quickly here as the formula has it, from 6 carries." */
export function learnedWords({ movementClass, factor, outcomes }: Learned): string {
  const from = `from ${formatCount(outcomes, 'carry', 'carries')}`
  const wood = `Wood of ${movementClass} movement follows`
  if (Math.abs(factor - 1) < ALIKE) return `${wood} as quickly here as the formula has it, ${from}.`
  return `${wood} about ${factor.toFixed(1)} × as quickly here as the formula has it, ${from}.`
}
