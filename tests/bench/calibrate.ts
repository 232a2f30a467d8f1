/**
 * One calibration unit: the median time of 20 million dependent three-point max-min updates on typed arrays in this
 * process. A figure divided by it means the same on a fast machine and a slow one.
 */
export function calibrate(rounds = 5): number {
  const size = 2000
  const updates = 20_000_000
  const values = new Float64Array(size)
  for (let i = 0; i < size; i++) values[i] = Math.sin(i * 12.9898) * 0.5
  const times: number[] = []
  for (let round = 0; round < rounds; round++) {
    const before = performance.now()
    for (let sweep = 0; sweep < updates / (size - 2); sweep++)
      for (let i = 1; i < size - 1; i++) {
        const here = values[i] as number
        const left = values[i - 1] as number
        const right = values[i + 1] as number
        values[i] = Math.max(Math.min(here, left + 1e-9), Math.min(left, right))
      }
    times.push(performance.now() - before)
  }
  // The sum is used, so that no engine may drop the loop.
  if (Number.isNaN(values.reduce((sum, value) => sum + value, 0))) throw new Error('the calibration loop went wrong')
  return median(times)
}

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((one, other) => one - other)
  const middle = sorted.length >> 1
  return sorted.length % 2
    ? (sorted[middle] as number)
    : ((sorted[middle - 1] as number) + (sorted[middle] as number)) / 2
}

/** Median time of `run` in milliseconds after one warm-up; `runs` counted. */
export function time(run: () => void, runs = 7): number {
  run()
  const times: number[] = []
  for (let i = 0; i < runs; i++) {
    const before = performance.now()
    run()
    times.push(performance.now() - before)
  }
  return median(times)
}
