/** A refusal in the words of the form, with where in the body it is. */
export interface Refusal {
  /** "left/filmCoefficient", "times/3"; empty for the whole. */
  path: string
  text: string
}
