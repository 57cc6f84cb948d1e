/** A number as a fraction of whole numbers: no digit is lost on the way through it. */
export interface Fraction {
  over: bigint
  under: bigint
}

const DECIMAL = /^(-?)(\d+)(?:\.(\d+))?(?:e([+-]?\d+))?$/

/** A finite number, or its decimal text, as the decimal that it is written as. */
export function fractionOf(decimal: number | string): Fraction {
  const match = DECIMAL.exec(String(decimal))
  if (!match) throw new Error(`${decimal} is no decimal number`)
  const [, sign, whole, part = '', exponent = '0'] = match
  const over = BigInt(`${sign}${whole}${part}`)
  const power = Number(exponent) - part.length
  return power < 0 ? { over, under: 10n ** BigInt(-power) } : { over: over * 10n ** BigInt(power), under: 1n }
}

export const times = (a: Fraction, b: Fraction): Fraction => ({ over: a.over * b.over, under: a.under * b.under })
export const over = (a: Fraction, b: Fraction): Fraction => ({ over: a.over * b.under, under: a.under * b.over })
export const minus = (a: Fraction, b: Fraction): Fraction => ({
  over: a.over * b.under - b.over * a.under,
  under: a.under * b.under,
})

/** Decimals with `*` and `/` between them, from left to right. */
export function productOf(text: string): Fraction {
  const [first = '', ...rest] = text.split(/(?=[*/])/)
  return rest.reduce(
    (product, part) => (part.startsWith('*') ? times : over)(product, fractionOf(part.slice(1))),
    fractionOf(first),
  )
}

/** Bits of the quotient: more than a double has, and one that says whether anything was left over. */
const BITS = 66

const lengthOf = (value: bigint) => value.toString(16).length * 4

/** The double next to a fraction: one rounding, to even. */
export function numberOf({ over, under }: Fraction): number {
  if (over === 0n) return 0
  const size = over < 0n ? -over : over
  const shift = BITS - lengthOf(size) + lengthOf(under)
  const [top, bottom] = shift < 0 ? [size, under << BigInt(-shift)] : [size << BigInt(shift), under]
  const rest = top % bottom === 0n ? 0n : 1n
  const rounded = Number(((top / bottom) << 1n) | rest)
  // In two steps, since a power of two may be too small where its product is not.
  const half = Math.trunc((shift + 1) / 2)
  const value = rounded * 2 ** -half * 2 ** (half - shift - 1)
  return over < 0n ? -value : value
}
