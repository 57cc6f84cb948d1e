/**
 * Calls that come while earlier ones are under way wait together and go as one. What would be a commit for each
 * call becomes one for many, and nobody waits longer than for the commit before.
 */
export function gather<T, R>(
  work: (items: T[]) => Promise<R[]>,
  { atOnce, most }: { atOnce: number; most: number },
): (item: T) => Promise<R> {
  let waiting: { item: T; resolve: (result: R) => void; reject: (error: unknown) => void }[] = []
  let running = 0

  async function run(): Promise<void> {
    running++
    while (waiting.length > 0) {
      const batch = waiting.slice(0, most)
      waiting = waiting.slice(most)
      try {
        const results = await work(batch.map((entry) => entry.item))
        batch.forEach((entry, i) => entry.resolve(results[i] as R))
      } catch (error) {
        for (const entry of batch) entry.reject(error)
      }
    }
    running--
  }

  return (item) =>
    new Promise((resolve, reject) => {
      waiting.push({ item, resolve, reject })
      if (running < atOnce) void run()
    })
}
