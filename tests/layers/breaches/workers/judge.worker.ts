export const worker = 1
