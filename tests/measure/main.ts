import { tableOf } from './timing'
import { woodLines } from './wood'

/** `npm run measure`: how quick the product is, each figure beside a baseline of the same run. */
process.stdout.write(`${tableOf(woodLines())}\n`)
