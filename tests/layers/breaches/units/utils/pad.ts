export const pad = 1
