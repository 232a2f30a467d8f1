import { turn } from './turn.ts'
export const circle = turn
