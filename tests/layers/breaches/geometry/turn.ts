import { circle } from './circle.ts'
export const turn = circle
