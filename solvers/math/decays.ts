/** What all places of a body have in common at one time: how far its modes have faded. */
export interface Faded {
  /** zₙ²Fo. */
  readonly exponents: readonly number[]
  /** e^(−zₙ²Fo). */
  readonly factors: readonly number[]
}

/** The decay of the modes of a series, kept for one Fourier number while its places are asked for. */
export class Decays {
  private readonly rootOf: (n: number) => number
  private fourier = NaN
  private found: Faded = { exponents: [], factors: [] }

  constructor(rootOf: (n: number) => number) {
    this.rootOf = rootOf
  }

  /** Of the modes 0 to `last`, that one included. */
  at(fourier: number, last: number): Faded {
    if (this.fourier !== fourier || this.found.factors.length <= last) this.find(fourier, last)
    return this.found
  }

  private find(fourier: number, last: number): void {
    const exponents: number[] = []
    const factors: number[] = []
    for (let n = 0; n <= last; n++) {
      const root = this.rootOf(n)
      const exponent = root * root * fourier
      exponents.push(exponent)
      factors.push(Math.exp(-exponent))
    }
    this.fourier = fourier
    this.found = { exponents, factors }
  }
}
