import { expect, it } from 'vitest'
import { oneLine } from '../../src/cli/ended.ts'
import { fileNames } from '../../src/cli/file-name.ts'

it('makes file names of ids, none the same and none outside the folder', () => {
  const ids = ['desk', 'Desk', 'a/b', 'a\\b', '../../etc/passwd', '..', 'con\u0000trol', 'مدخل', ' ', 'x'.repeat(300)]
  const names = [...fileNames(ids).values()]
  expect(names).toEqual([
    'desk',
    'Desk-2',
    'a-b',
    'a-b-2',
    'etc-passwd',
    'walk',
    'con-trol',
    'مدخل',
    'walk-2',
    'x'.repeat(80),
  ])
})

it('keeps a complaint on one line that steers no terminal', () => {
  expect(oneLine('a\nb\u001b[31m\u202ec')).toBe('a b?[31m?c')
  expect(oneLine('x'.repeat(1000))).toHaveLength(600)
})
