/** One element of MathML: its name, and either its text or what it holds. */
export type MathNode = {
  readonly tag: string
  readonly text?: string
  readonly children?: readonly MathNode[]
  readonly attributes?: Readonly<Record<string, string>>
}

const FUNCTIONS = new Set(['exp', 'ln', 'sin', 'cos', 'tan', 'erfc', 'min', 'max'])
const NUMBER = /^\d[\d.,]*/
const NAME = /^[A-Za-zα-ωΑ-Ωℓ∂]+/
const QUOTED = /^"([^"]*)"/
const CLOSING: Readonly<Record<string, string>> = { '(': ')', '[': ']', '{': '}', '|': '|' }
/** So wide a gap stands between two things that are multiplied, so that they don't read as one name. */
const THIN: MathNode = { tag: 'mspace', attributes: { width: '0.16em' } }

const row = (children: readonly MathNode[]): MathNode =>
  children.length === 1 && children[0] !== undefined ? children[0] : { tag: 'mrow', children }
const operator = (text: string): MathNode => ({ tag: 'mo', text })
/** Brackets round a fraction are as tall as it is. Not every font can stretch its own, so they are set larger and lower. */
const fence = (text: string, isTall: boolean): MathNode =>
  isTall
    ? {
        tag: 'mpadded',
        attributes: { voffset: '-0.4em' },
        children: [{ tag: 'mo', text, attributes: { mathsize: '210%', stretchy: 'false' } }],
      }
    : operator(text)
const holdsFraction = (node: MathNode): boolean =>
  node.tag === 'mfrac' || (node.children ?? []).some(holdsFraction)
const isOperand = (node: MathNode | undefined): boolean =>
  node !== undefined && node.tag !== 'mo' && node.tag !== 'mspace' && node.text !== 'Δ'

/**
 * MathML of a formula as one would type it: names, numbers and operators as they are, `_` and `^` for scripts, `{a}/{b}` for
 * a fraction, `√{a}` for a root, braces for what belongs together without showing, `"words"` for text.
 * @throws RangeError where brackets don't match, or a script or fraction lacks a part
 */
export function mathOf(notation: string): readonly MathNode[] {
  const reader = new Reader(notation)
  return sequence(reader, undefined)
}

class Reader {
  private at = 0
  constructor(private readonly text: string) {}

  /** What is left, without the blanks before it. */
  get rest(): string {
    while (this.text[this.at] === ' ') this.at += 1
    return this.text.slice(this.at)
  }

  take(length: number): void {
    this.at += length
  }

  takeIf(text: string): boolean {
    if (!this.rest.startsWith(text)) return false
    this.take(text.length)
    return true
  }

  fail(why: string): never {
    throw new RangeError(`${why} at ${String(this.at)} of "${this.text}"`)
  }
}

function sequence(reader: Reader, until: string | undefined): MathNode[] {
  const nodes: MathNode[] = []
  for (;;) {
    if (until === undefined ? reader.rest === '' : reader.takeIf(until)) return nodes
    if (reader.rest === '') reader.fail(`no ${until ?? 'end'}`)
    const node = scripted(reader)
    if (isOperand(node) && isOperand(nodes.at(-1))) nodes.push(THIN)
    nodes.push(node)
  }
}

/** An atom with its scripts, and the fraction that it may begin. */
function scripted(reader: Reader): MathNode {
  const isGroup = reader.rest.startsWith('{')
  const base = atom(reader)
  if (isGroup && reader.takeIf('/')) {
    if (!reader.rest.startsWith('{')) reader.fail('a fraction takes {a}/{b}')
    return { tag: 'mfrac', children: [base, atom(reader)] }
  }
  const below = reader.takeIf('_') ? atom(reader) : undefined
  const above = reader.takeIf('^') ? atom(reader) : undefined
  const isTall = base.tag === 'mo' && base.text === '∑'
  if (below !== undefined && above !== undefined)
    return { tag: isTall ? 'munderover' : 'msubsup', children: [base, below, above] }
  if (below !== undefined) return { tag: isTall ? 'munder' : 'msub', children: [base, below] }
  return above === undefined ? base : { tag: 'msup', children: [base, above] }
}

function atom(reader: Reader): MathNode {
  const { rest } = reader
  const number = NUMBER.exec(rest)?.[0].replace(/[.,]$/, '')
  if (number !== undefined) {
    reader.take(number.length)
    return { tag: 'mn', text: number }
  }
  const name = NAME.exec(rest)?.[0]
  if (name !== undefined) return named(reader, name)
  const quoted = QUOTED.exec(rest)
  if (quoted !== null) {
    reader.take(quoted[0].length)
    return { tag: 'mtext', text: quoted[1] ?? '' }
  }
  const first = [...rest][0]
  if (first === undefined || '_^)]}'.includes(first)) reader.fail('something is missing')
  reader.take(first.length)
  if (first === '√') return { tag: 'msqrt', children: [atom(reader)] }
  const closing = CLOSING[first]
  if (closing === undefined) return operator(first)
  const inside = sequence(reader, closing)
  if (first === '{') return row(inside)
  const isTall = inside.some(holdsFraction)
  return { tag: 'mrow', children: [fence(first, isTall), ...inside, fence(closing, isTall)] }
}

function named(reader: Reader, name: string): MathNode {
  reader.take(name.length)
  // One letter is slanted by its style and not by another alphabet, which the page's own font lacks.
  const isOneLetter = [...name].length === 1 && name !== 'Δ'
  const node: MathNode = isOneLetter
    ? { tag: 'mi', text: name, attributes: { mathvariant: 'normal', class: 'italic' } }
    : { tag: 'mi', text: name }
  const isBare = FUNCTIONS.has(name) && !/^[(_^]/.test(reader.rest)
  return isBare ? { tag: 'mrow', children: [node, THIN] } : node
}
