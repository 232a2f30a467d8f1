import { spawnSync } from 'node:child_process'
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { build } from 'vite'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'

const root = fileURLToPath(new URL('../..', import.meta.url))
/** Inside the project, so that the packages are found; never dist, which others build. */
const program = join(root, '.tsbuild', 'cli-under-test')
const small = join(root, 'tests/fixtures/cli/small.json')
let folder = ''

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'cli-'))
  await build({ configFile: join(root, 'scripts/cli.vite.config.ts'), logLevel: 'error', build: { outDir: program } })
})
afterAll(() => {
  rmSync(folder, { recursive: true })
  rmSync(program, { recursive: true })
})

function tautline(...args: string[]) {
  const { status, stdout, stderr } = spawnSync(process.execPath, [join(program, 'cli.js'), ...args], {
    cwd: folder,
    encoding: 'utf8',
  })
  return { status, stdout, stderr }
}

describe('the built program', () => {
  it('is one file with a first line for the shell', () => {
    expect(readdirSync(program)).toEqual(['cli.js'])
    expect(readFileSync(join(program, 'cli.js'), 'utf8').split('\n')[0]).toBe('#!/usr/bin/env node')
  })

  it('says its version', () => {
    const { version } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8'))
    expect(tautline('--version')).toEqual({ status: 0, stdout: `${version}\n`, stderr: '' })
  })

  it('exits 0 on a verdict that is none', () => {
    const { status, stdout, stderr } = tautline('assess', small)
    expect([status, stderr]).toEqual([0, ''])
    expect(JSON.parse(stdout).walks[0].verdict).toBe('not-known')
  })

  it.each([
    [['assess', 'none.json'], 'none.json: no such file: give the path of a survey file\n'],
    [['assess', '.'], '.: it is a folder: give the path of a survey file\n'],
    [
      ['sheet', small, '--for', 'venue', '--form', 'wax', '--out', 'o'],
      'form wax is not in this version; forms: html, text',
    ],
  ])('exits 2 with one line and writes nothing: %j', (args, line) => {
    const { status, stdout, stderr } = tautline(...args)
    expect([status, stdout]).toEqual([2, ''])
    expect(stderr.startsWith(line)).toBe(true)
    expect(stderr.match(/\n/g)).toHaveLength(1)
    expect(readdirSync(folder)).toEqual([])
  })

  it('writes a sheet in every form and prints where', () => {
    for (const [form, ending] of Object.entries({
      html: 'html',
      text: 'txt',
      pdf: 'pdf',
      braille: 'brf',
      word: 'docx',
      csv: 'csv',
      geojson: 'geojson',
    })) {
      const { status, stdout, stderr } = tautline('sheet', small, '--for', 'venue', '--form', form, '--out', 'o')
      expect([status, stderr, stdout], form).toEqual([0, '', `o/a-..-b-venue.${ending}\n`])
      expect(existsSync(join(folder, stdout.trim())), form).toBe(true)
    }
    expect(readdirSync(join(folder, 'o')).every((name) => !name.endsWith('.part'))).toBe(true)
  })
})
