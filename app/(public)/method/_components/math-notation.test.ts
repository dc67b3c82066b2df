import { describe, expect, it } from 'vitest'
import { mathOf, type MathNode } from './math-notation'

/** As markup, to be read in a test. */
const markup = (nodes: readonly MathNode[]): string =>
  nodes
    .map(({ tag, text, children }) =>
      tag === 'mspace' ? '·' : `<${tag}>${text ?? markup(children ?? [])}</${tag}>`,
    )
    .join('')
const of = (notation: string) => markup(mathOf(notation))

describe('formulas as typed', () => {
  it.each([
    ['a = 12.5', '<mi>a</mi><mo>=</mo><mn>12.5</mn>'],
    ['C_T d', '<msub><mi>C</mi><mi>T</mi></msub>·<mi>d</mi>'],
    ['{a}/{b + 1}', '<mfrac><mi>a</mi><mrow><mi>b</mi><mo>+</mo><mn>1</mn></mrow></mfrac>'],
    ['x_i^2', '<msubsup><mi>x</mi><mi>i</mi><mn>2</mn></msubsup>'],
    ['√{a + b}', '<msqrt><mrow><mi>a</mi><mo>+</mo><mi>b</mi></mrow></msqrt>'],
    ['(1 − h)^2', '<msup><mrow><mo>(</mo><mn>1</mn><mo>−</mo><mi>h</mi><mo>)</mo></mrow><mn>2</mn></msup>'],
    ['sin θ', '<mrow><mi>sin</mi>·</mrow>·<mi>θ</mi>'],
    ['∑_{n} w', '<munder><mo>∑</mo><mi>n</mi></munder>·<mi>w</mi>'],
    ['Δ t', '<mi>Δ</mi><mi>t</mi>'],
    ['|m|', '<mrow><mo>|</mo><mi>m</mi><mo>|</mo></mrow>'],
    [
      '({a}/{b})',
      '<mrow><mpadded><mo>(</mo></mpadded><mfrac><mi>a</mi><mi>b</mi></mfrac><mpadded><mo>)</mo></mpadded></mrow>',
    ],
    ['"or" x', '<mtext>or</mtext>·<mi>x</mi>'],
  ])('%s', (notation, expected) => {
    expect(of(notation)).toBe(expected)
  })

  it.each(['(a', 'a)', 'a_', '{a}/b', '{a'])('refuses %s', (notation) => {
    expect(() => mathOf(notation)).toThrow(RangeError)
  })
})
