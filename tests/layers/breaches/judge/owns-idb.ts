import { openDB } from 'idb'
export const open = openDB
