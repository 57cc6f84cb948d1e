import { performance } from 'node:perf_hooks'

/**
 * Runs one step of a command. On stderr: its label once it lasts a second, a sign of life while it lasts, its time at the end.
 * @template T
 * @param {string} label
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function step(label, work) {
  const begun = performance.now()
  const seconds = () => Math.round((performance.now() - begun) / 1000)
  const live = process.stderr.isTTY
  const show = () => process.stderr.write(live ? `\r${label} … ${seconds()} s` : `${label} … ${seconds()} s\n`)
  let timer = setTimeout(function again() {
    show()
    timer = setTimeout(again, live ? 1000 : 15000)
  }, 1000)
  let ended = 'failed'
  try {
    const result = await work()
    ended = 'done'
    return result
  } finally {
    clearTimeout(timer)
    const took = ((performance.now() - begun) / 1000).toFixed(1)
    process.stderr.write(`${live ? '\r\x1b[K' : ''}${label}: ${ended}, ${took} s\n`)
  }
}
