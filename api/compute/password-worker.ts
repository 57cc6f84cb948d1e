import bcrypt from 'bcryptjs'

const COST = 12
/** Compared with where there is none, so that an unknown address takes as long as a wrong password. */
const absent = bcrypt.hashSync('nobody has this password', COST)

/** Runs in a thread: without `hash` a new hash, else whether it fits. */
export default async function password(task: { password: string; hash?: string | null }): Promise<string | boolean> {
  if (task.hash === undefined) return bcrypt.hash(task.password, COST)
  if (bcrypt.truncates(task.password)) return false
  if (task.hash !== null) return bcrypt.compare(task.password, task.hash)
  await bcrypt.compare(task.password, absent)
  return false
}
