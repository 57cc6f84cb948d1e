/**
 * What the reader needs first: the address, who can sign in, one call to paste, and what that very call answers.
 * @param {{local: string, publicUrl: string}} address
 * @param {import('./demo.mjs').Demo} demo
 */
export async function greet({ local, publicUrl }, { signIns, key }) {
  const width = Math.max(...signIns.map(({ mail }) => mail.length))
  const lines = [
    `Soakstone runs at ${publicUrl}`,
    '',
    `Sign in at ${publicUrl}/sign-in, support at ${publicUrl}/staff/sign-in:`,
    ...signIns.map(({ role, mail, password }) => `  ${role.padEnd(10)}  ${mail.padEnd(width)}  ${password}`),
    '',
    'A first call, a wall of 0.2 m that meets the cold on both faces, after 1 and 10 hours:',
    '',
  ]
  const call = await firstCall(local, key)
  console.log(
    [...lines, curlOf(call), '', `It answers (${call.status}, ${call.charged} points charged):`, '', call.answer].join(
      '\n',
    ),
  )
}

/**
 * @param {string} local
 * @param {string} key
 */
async function firstCall(local, key) {
  const description = await fetch(`${local}/v1/cases/slab-convection`)
  const { example } = /** @type {{example: object}} */ (await description.json())
  const url = `${local}/v1/cases/slab-convection/solve`
  const body = JSON.stringify(example)
  const headers = { authorization: `Bearer ${key}`, 'content-type': 'application/json' }
  const response = await fetch(url, { method: 'POST', headers, body })
  const charged = response.headers.get('points-charged') ?? 'no'
  return { url, key, body, status: response.status, charged, answer: (await response.text()).trim() }
}

/** @param {{url: string, key: string, body: string}} call */
function curlOf({ url, key, body }) {
  const quoted = body.replaceAll("'", `'\\''`)
  return `curl -sS '${url}' \\\n  -H 'Authorization: Bearer ${key}' \\\n  -H 'Content-Type: application/json' \\\n  -d '${quoted}'`
}
