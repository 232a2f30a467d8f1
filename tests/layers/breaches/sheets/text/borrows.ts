export type { Html } from '../html/form.ts'
