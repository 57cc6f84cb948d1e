import { readFileSync, rmSync, writeFileSync } from 'node:fs'

/**
 * A file that names the process that made it. Taking it over from a process that is gone needs no help.
 * @param {string} file
 * @returns {{held: true, release(): void} | {held: false, by: number}}
 */
export function tryLock(file) {
  for (let attempt = 0; attempt < 3; attempt++) {
    try {
      writeFileSync(file, `${process.pid} ${startOf(process.pid)}`, { flag: 'wx', mode: 0o600 })
      return { held: true, release: () => rmSync(file, { force: true }) }
    } catch (error) {
      if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EEXIST') throw error
    }
    const holder = holderOf(file)
    if (holder) return { held: false, by: holder }
    rmSync(file, { force: true })
  }
  return { held: false, by: 0 }
}

/**
 * The process that holds the file, if it still runs.
 * @param {string} file
 * @returns {number | null}
 */
function holderOf(file) {
  const [pid, start] = readText(file).split(' ')
  return pid && startOf(Number(pid)) === start ? Number(pid) : null
}

/**
 * When a process started, in ticks since boot: a number taken again by another process does not pass for it.
 * @param {number} pid
 */
function startOf(pid) {
  return readText(`/proc/${pid}/stat`).split(') ').at(-1)?.split(' ')[19]
}

/** @param {string} file */
function readText(file) {
  try {
    return readFileSync(file, 'utf8')
  } catch {
    return ''
  }
}
