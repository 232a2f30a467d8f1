export const lazy = () => import('../../leash/clearance.ts')
