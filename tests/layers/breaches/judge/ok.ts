export type Thing = 1
