export type A = import('../judge/ok.ts').Thing
