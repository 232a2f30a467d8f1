export const clearance = 1
