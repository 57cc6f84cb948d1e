/** Something the reader must put right: its message is one sentence that says what to do, so no stack is shown. */
export class Refusal extends Error {
  /**
   * @param {string} sentence
   * @param {string} [output] what a program said, shown above the sentence
   */
  constructor(sentence, output = '') {
    super(sentence)
    this.name = 'Refusal'
    this.output = output
  }
}

/**
 * Runs a command's main function; a refusal becomes its sentence and exit code 1, anything else keeps its stack.
 * @param {() => Promise<number | void>} main resolves to the exit code
 */
export async function runMain(main) {
  try {
    process.exitCode = (await main()) ?? 0
  } catch (error) {
    explain(error)
    process.exitCode = 1
  }
}

/** @param {unknown} error */
export function explain(error) {
  if (!(error instanceof Refusal)) return console.error(error)
  const output = error.output.trim()
  if (output) console.error(output)
  console.error(error.message)
}
