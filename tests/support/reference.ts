import { readFileSync } from 'node:fs'
import { join } from 'node:path'

const folder = join(import.meta.dirname, '..', 'fixtures', 'reference')

/** One row of a reference table: column name to text as printed. */
export type ReferenceRow = {
  text: (column: string) => string
  number: (column: string) => number
}

function cellsOf(line: string): string[] {
  const cells: string[] = []
  let cell = ''
  let quoted = false
  for (const character of line) {
    if (character === '"') quoted = !quoted
    else if (character === ',' && !quoted) {
      cells.push(cell)
      cell = ''
    } else cell += character
  }
  return [...cells, cell]
}

/**
 * The rows of a CSV in tests/fixtures/reference. Lines that begin with # name the source and are passed over.
 * A missing file, an empty table, an unknown column or a cell that is not a number throws: a test over no rows
 * would otherwise pass.
 */
export function referenceRows(file: string): ReferenceRow[] {
  const lines = readFileSync(join(folder, file), 'utf8')
    .split('\n')
    .filter((line) => line !== '' && !line.startsWith('#'))
  const [header, ...body] = lines.map(cellsOf)
  if (header === undefined || body.length === 0) throw new Error(`${file} has no rows`)
  return body.map((cells) => {
    const text = (column: string): string => {
      const cell = cells[header.indexOf(column)]
      if (cell === undefined) throw new Error(`${file} has no column ${column} in the row ${cells.join(',')}`)
      return cell
    }
    const number = (column: string): number => {
      const value = text(column) === 'inf' ? Infinity : Number(text(column))
      if (text(column) === '' || Number.isNaN(value)) {
        throw new Error(`${file}: ${column} is not a number in the row ${cells.join(',')}`)
      }
      return value
    }
    return { text, number }
  })
}

/** A JSON file of tests/fixtures/reference, unparsed: the test states its shape with zod. */
export function referenceJson(file: string): unknown {
  return JSON.parse(readFileSync(join(folder, file), 'utf8'))
}
