/** The invented venues that come with the app, each its own file, read when it is asked for. */
const files = import.meta.glob<unknown>('../../../demo-venues/*.json', { import: 'default' })

export interface Demo {
  name: string
  about: string
  /** The text of its file. */
  read(): Promise<string>
}

const told = [
  { file: 'museum', name: 'Quern House Museum', about: 'Galleries, a staircase, an unguarded edge' },
  { file: 'clinic', name: 'Fennel Lane Clinic', about: 'An automatic street door, corridors, a lift' },
  { file: 'interchange', name: 'Millrace Tram Interchange', about: 'Platforms, crowds, a ramp, a road' },
  { file: 'teaching', name: 'Larch Teaching Building', about: 'A narrow corridor, glass, a magnet laboratory' },
] as const

export const demos: readonly Demo[] = told.flatMap(({ file, name, about }) => {
  const read = files[`../../../demo-venues/${file}.json`]
  return read ? [{ name, about, read: async () => JSON.stringify(await read()) }] : []
})
