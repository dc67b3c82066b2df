import { airFormulas } from './formulas/air-formulas'
import { doubtFormulas } from './formulas/doubt-formulas'
import { emcFormulas } from './formulas/emc-formulas'
import { fitFormulas } from './formulas/fit-formulas'
import { followingFormulas } from './formulas/following-formulas'
import { movementFormulas } from './formulas/movement-formulas'
import { saltsFormulas } from './formulas/salts-formulas'
import { shopFormulas } from './formulas/shop-formulas'
import { timeOutFormulas } from './formulas/time-out-formulas'
import { weighingFormulas } from './formulas/weighing-formulas'
import type { FormulaFacts } from './formula-facts'

/** A part of the page with formulas. Its id is what the bench links to, and that of its worked example. */
export type MethodSection = {
  readonly id: string
  readonly title: string
  readonly intro: string
  readonly formulas: readonly FormulaFacts[]
}

export const methodSections: readonly MethodSection[] = [
  {
    id: 'emc',
    title: 'Wood and air',
    intro:
      'EMC is short for equilibrium moisture content: where wood left in an air ends. Everything else hangs on it, and a difference of it is told in points of % MC.',
    formulas: emcFormulas,
  },
  {
    id: 'air',
    title: 'The air itself',
    intro: 'What a sensor reads, turned into the water that is in the air.',
    formulas: airFormulas,
  },
  {
    id: 'movement',
    title: 'How wood moves',
    intro:
      'Each wood’s figures stand with their source and status in the table of woods; these are the sums that are done with them.',
    formulas: movementFormulas,
  },
  {
    id: 'fit',
    title: 'Whether the lid turns',
    intro: 'A joint is cut round in one air and becomes an oval in another.',
    formulas: fitFormulas,
  },
  {
    id: 'following',
    title: 'How wood follows the air',
    intro: 'Wood does not jump with the air. How far it has come decides what a lid does tonight.',
    formulas: followingFormulas,
  },
  {
    id: 'time-out',
    title: 'How long a piece may stay',
    intro: 'What binds is the joint, so ring and lid are followed apart, each by its own way to the air.',
    formulas: timeOutFormulas,
  },
  {
    id: 'weighing',
    title: 'Weighings and readiness',
    intro: 'A scale sees what no sensor does: the water that is still in the wood.',
    formulas: weighingFormulas,
  },
  {
    id: 'shop',
    title: 'Warming and drying the shop',
    intro: 'All of it advice: nothing is switched on or off.',
    formulas: shopFormulas,
  },
  {
    id: 'salts',
    title: 'Checking a sensor by salts',
    intro: 'Fixed points of humidity that cost next to nothing.',
    formulas: saltsFormulas,
  },
  {
    id: 'doubt',
    title: 'Doubt',
    intro:
      'A time or a fit is never told without how far it may be out: the middle 8 in 10, from one engine that is the same everywhere.',
    formulas: doubtFormulas,
  },
]

/** The parts of the page that hold tables and lists. */
export const otherSections = [
  { id: 'status', title: 'What the status words mean' },
  { id: 'tables', title: 'Held against published tables' },
  { id: 'defaults', title: 'Defaults and thresholds' },
  { id: 'not-covered', title: 'What the model does not cover' },
] as const

export type OtherSectionId = (typeof otherSections)[number]['id']

export const titleOf = (id: OtherSectionId): string =>
  otherSections.find((section) => section.id === id)?.title ?? id

/** The list of contents, in the order of the page. */
export const contents: readonly { readonly id: string; readonly title: string }[] = [
  otherSections[0],
  ...methodSections,
  ...otherSections.slice(1),
]
