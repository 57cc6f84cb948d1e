import { step } from './progress.mjs'
import { Refusal } from './refusal.mjs'
import { attempt, run } from './run.mjs'

/**
 * Installs a Debian package, as root or by sudo without a password; otherwise says what to install.
 * @param {string} name
 * @param {{before?: [file: string, text: string]}} [options] what a file must say before the package is unpacked
 */
export async function installPackage(name, { before } = {}) {
  const prefix = await privilege()
  if (!prefix)
    throw new Refusal(
      `${name} is missing and only root may install it: run "sudo apt-get install ${name}", then this again.`,
    )
  // A file written before its package arrives is a changed configuration file to dpkg: keep ours, ask nothing.
  const apt = ['env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', '-q', '-y', '-o', 'Dpkg::Options::=--force-confold']
  const refusal = `${name} could not be installed: run "apt-get update && apt-get install ${name}" as root, mend what it says, then this again.`
  const as = (/** @type {string[]} */ words, /** @type {string} */ input = '') => {
    const [command = 'env', ...args] = [...prefix, ...words]
    return run(command, args, { input, refusal })
  }
  await step(`Installing Debian's ${name}`, async () => {
    if (before) await as(['sh', '-c', 'mkdir -p "$(dirname "$1")" && cat >> "$1"', 'sh', before[0]], before[1])
    await as([...apt, 'update'])
    await as([...apt, 'install', '--no-install-recommends', name])
  })
}

/** @returns {Promise<string[] | null>} what to put before a command so that root runs it */
async function privilege() {
  if (process.getuid?.() === 0) return []
  const { code } = await attempt('sudo', ['-n', 'true'])
  return code === 0 ? ['sudo', '-n'] : null
}
