export const queue = new Worker(new URL('../../workers/judge.worker.ts', import.meta.url))
