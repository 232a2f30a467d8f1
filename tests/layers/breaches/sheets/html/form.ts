export type Html = string
