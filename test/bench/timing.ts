export interface Timing {
  /** [ms] */
  readonly median: number
  readonly best: number
  readonly runs: number
}

/** Times `work` after `warmUp` runs that let the compiler settle. */
export function time(work: () => unknown, runs = 15, warmUp = 10): Timing {
  for (let i = 0; i < warmUp; i++) work()
  const times = Array.from({ length: runs }, () => {
    const start = performance.now()
    work()
    return performance.now() - start
  }).toSorted((a, b) => a - b)
  return { median: times[Math.floor(runs / 2)] ?? 0, best: times[0] ?? 0, runs }
}
