import type { Thing } from '../judge/ok.ts'
export type T = Thing
