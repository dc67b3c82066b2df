import { tableOf } from './timing'
import { woodLines } from './wood'
import { scoredYear, seedsOf } from './year/year'

/**
 * `npm run measure`: how quick the product is, each figure beside a baseline of the same run, and how right, over
 * simulated years. `-- year` for the years alone, `-- quick` for the first alone; `--seeds 1,2,3` chooses the years.
 */
const args = process.argv.slice(2)
const say = (text: string): void => void process.stdout.write(text)
const isOnly = (part: string): boolean => args.includes(part)

const seeds = seedsOf(args)
if (!isOnly('year')) say(`${tableOf(woodLines())}\n`)
if (!isOnly('quick')) await scoredYear(seeds, say)
