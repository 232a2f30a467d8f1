import { join } from 'node:path'
import { build } from 'vite'
import type { TestProject } from 'vitest/node'
import { startPostgres } from './start-postgres.ts'

declare module 'vitest' {
  export interface ProvidedContext {
    /** Address of a PostgreSQL without a database name. */
    postgres: string
    /** The office's program, one file. */
    program: string
  }
}

export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const root = join(import.meta.dirname, '..', '..')
  // Inside the project, so that the database's binary is found; apart from dist, which other suites build.
  const folder = join(root, '.tsbuild', 'office-under-test')
  process.env.TAUTLINE_OFFICE_OUT = folder
  await build({ configFile: join(root, 'scripts', 'office.vite.config.ts'), logLevel: 'warn' })
  const postgres = await startPostgres()
  project.provide('postgres', postgres.address)
  project.provide('program', join(folder, 'office.js'))
  return postgres.stop
}
