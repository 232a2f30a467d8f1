import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import type { Ended, Machine } from '../../src/cli/ended.ts'
import { run } from '../../src/cli/run.ts'

const small = readFileSync(new URL('../fixtures/cli/small.json', import.meta.url), 'utf8')

/** A machine with these files and no others. */
function machine(files: Record<string, string> = {}): Machine {
  const all: Record<string, string> = { 'small.json': small, ...files }
  return {
    read: (path) =>
      Object.hasOwn(all, path)
        ? { ok: true, text: all[path] as string }
        : { ok: false, why: 'no such file', missing: true },
    today: () => '2026-12-01',
  }
}

async function ended(line: string, files?: Record<string, string>): Promise<Ended> {
  return run(
    line.split(' ').filter((word) => word !== ''),
    machine(files),
  )
}

async function done(line: string, files?: Record<string, string>) {
  const end = await ended(line, files)
  if (!end.ok) throw new Error(end.line)
  return end
}

describe('bad input', () => {
  const broken = JSON.parse(small)
  broken.view.walks[0].segments[0].ledBy = 'a bus'
  const files = {
    'broken.json': JSON.stringify(broken),
    'text.json': '{"kind": ',
    'team.json': '{"kind":"tautline-survey"}',
  }

  it.each([
    ['', 'no command is given: commands: assess, '],
    ['asses small.json', 'asses is no command: commands: assess, '],
    ['constructor small.json', 'constructor is no command: '],
    ['assess', 'no FILE is given: give one FILE'],
    ['assess small.json more.json', '"more.json" is one word too many: give one FILE'],
    ['assess none.json', 'none.json: no such file: give the path of a survey file'],
    ['assess text.json', 'text.json'],
    ['assess broken.json', 'broken.json, view/walks/0/segments/0/ledBy: expected '],
    ['assess small.json --team none.json', '--team none.json: no such file: '],
    ['assess small.json --team team.json', 'team.json, kind: expected '],
    ['assess small.json --code bsi', '--code bsi is not known: write --code with one of us-ada-2010, uk-adm-k, '],
    ['assess small.json --on 2026-02-30', '--on 2026-02-30 is no day: write it like '],
    ['assess small.json --walk w9', '--walk w9 is not in small.json: its walks: a/../b'],
    ['assess small.json --walk', '--walk has no value: write --walk VALUE'],
    ['assess small.json --walk=', '--walk has no value: '],
    ['assess small.json --on 2026-11-30 --on 2026-11-30', '--on is given twice: keep one'],
    ['assess small.json --pace 1', '--pace is no option of this command: options: --team, --code, '],
    [
      'sheet small.json --form html --out o',
      '--for is not given: write --for with one of client, venue, file, reception',
    ],
    ['sheet small.json --for me --form html --out o', '--for me is not known: '],
    ['sheet small.json --for venue --form toString --out o', 'form toString is not in this version; forms: html, text'],
    ['sheet small.json --for venue --out o', '--form is not given; forms: html, text'],
    ['sheet small.json --for venue --form html', '--out is not given: write --out DIR'],
    ['sheet small.json --for client --form csv --out o', 'Door to stage is not-known: a client has no csv of it: '],
    ['schema', 'no name: survey, team or pack is given: '],
    ['schema venue', 'schema venue is not known: write schema survey, schema team or schema pack'],
  ])('"%s" is one line on what, where and what to do', async (line, start) => {
    const end = await ended(line, files)
    expect(end.ok).toBe(false)
    if (end.ok) return
    expect(end.line.slice(0, start.length)).toBe(start)
    expect(end.line).not.toContain('\n')
    expect(end.line.length).toBeGreaterThan(start.length - 1)
    expect(Object.keys(end)).toEqual(['ok', 'line'])
  })
})

describe('assess', () => {
  it('prints one object of the promised shape, whatever the verdict', async () => {
    const { out, files } = await done('assess small.json')
    expect(files).toEqual([])
    const result = JSON.parse(out)
    expect(result).toMatchObject({
      venue: 'Rook Lane Hall (invented)',
      team: { name: 'default team', version: '1' },
      code: 'own',
      on: '2026-11-30',
    })
    const [walk] = result.walks
    expect(walk).toMatchObject({ id: 'a/../b', verdict: 'not-known', score: null, leash: null, pauses: 0 })
    expect(Object.keys(walk)).toEqual(
      expect.arrayContaining(
        'id name verdict score governing leash pace pauses cautions changes checks why missing conditions segments'.split(
          ' ',
        ),
      ),
    )
    expect(walk.segments[0]).toMatchObject({ id: 's1', name: 'Hall', ledBy: 'robot', verdict: 'not-known' })
    expect(Object.keys(walk.segments[0])).toEqual(
      expect.arrayContaining(
        'id name ledBy verdict score governing sentence checks why window leash pace pauses cautions missing conditions retakes'.split(
          ' ',
        ),
      ),
    )
    expect(walk.segments[0].missing).toEqual(expect.arrayContaining(['width', 'overhead', 'edge', 'step', 'door']))
    for (const check of [...walk.checks, ...walk.segments[0].checks])
      expect(Object.keys(check)).toEqual('id feature state caution demand capacity ratio at source readings'.split(' '))
    for (const why of walk.why) expect(Object.keys(why)).toEqual(['kind', 'text', 'readings'])
  })

  it('takes another code pack, and today for a survey that is no demo', async () => {
    const real = JSON.parse(small)
    delete real.view.demo
    const { out } = await done('assess real.json --code uk-adm-k', { 'real.json': JSON.stringify(real) })
    expect(JSON.parse(out)).toMatchObject({ code: 'uk-adm-k', on: '2026-12-01' })
    const other = await done('assess real.json --on 2026-12-24', { 'real.json': JSON.stringify(real) })
    expect(JSON.parse(other.out).on).toBe('2026-12-24')
  })

  it('takes another team card, what it leaves out from the default', async () => {
    const team = JSON.stringify({
      kind: 'tautline-team',
      version: 1,
      name: 'Plover team',
      revision: '9',
      handler: { opensDoors: true },
    })
    const { out } = await done('assess small.json --team t.json', { 't.json': team })
    expect(JSON.parse(out).team).toEqual({ name: 'Plover team', version: '9' })
  })
})

describe('the memo', () => {
  it.each([
    ['broken text', '{'],
    ['another file', small],
    ['another version', '{"kind":"tautline-memo","version":2,"planner":"unbuilt","entries":[]}'],
    ['another planner', '{"kind":"tautline-memo","version":1,"planner":"old","entries":[]}'],
    [
      'an entry that is no answer',
      '{"kind":"tautline-memo","version":1,"planner":"unbuilt","entries":[["k",{"mTaut":"wide"}]]}',
    ],
  ])('is left aside with a note: %s', async (_, text) => {
    const end = await done('assess small.json --memo m.json', { 'm.json': text })
    expect(end.notes).toEqual(['--memo m.json: the memo is not of this version and is written anew'])
    expect(end.files.map(({ path }) => path)).toEqual(['m.json'])
    const again = await done('assess small.json --memo m.json', { 'm.json': String(end.files[0]?.content) })
    expect([again.notes, again.files]).toEqual([[], []])
    expect(again.out).toBe((await done('assess small.json')).out)
  })
})

describe('clearance', () => {
  const turn = 'clearance --scene turn --w1 1 --w2 1 --angle 90 --separation 1.0'

  it('prints the answer to one scene', async () => {
    const { out, files } = await done(turn)
    expect(files).toEqual([])
    const answer = JSON.parse(out)
    expect(Object.keys(answer)).toEqual(
      'scene separation mTaut mTautHigh mSlack mSlackHigh pauses tightest swing milliseconds'.split(' '),
    )
    // An independent slow solver found 0.062 for this corner, wanted to a centimetre and never above.
    expect(answer.mTaut).toBeGreaterThan(0.05)
    expect(answer.mTaut).toBeLessThanOrEqual(0.065)
  })

  it('gives the motion as a file where it is asked for', async () => {
    const { files } = await done(`${turn} --motion m.json`)
    expect(files.map(({ path }) => path)).toEqual(['m.json'])
    expect(JSON.parse(String(files[0]?.content))).toMatchObject({ kind: 'tautline-motion', version: 1, separation: 1 })
  })

  it.each([
    ['clearance', '--scene is missing: '],
    ['clearance --scene turn --w1 wide --w2 1 --angle 90 --separation 1', '--w1 is "wide": write a plain number'],
    ['clearance --scene none.json --separation 1', 'none.json cannot be read: give turn'],
  ])('"%s" is one line', async (line, start) => {
    const end = await ended(line)
    expect(end).toEqual({ ok: false, line: expect.stringContaining(start) })
  })
})

describe('sheet', () => {
  it('names its files by walk and reader, inside the folder whatever the id', async () => {
    for (const [form, ending] of [
      ['html', 'html'],
      ['text', 'txt'],
      ['csv', 'csv'],
      ['geojson', 'geojson'],
      ['audio', 'txt'],
    ]) {
      const { out, files } = await done(`sheet small.json --for venue --form ${form} --out o`)
      expect(out).toBe(`o/a-..-b-venue.${ending}\n`)
      expect(files.map(({ path }) => path)).toEqual([`o/a-..-b-venue.${ending}`])
    }
  })

  it('gives the client of a walk that is not known its one form', async () => {
    const { files } = await done('sheet small.json --for client --form text --out o')
    expect(String(files[0]?.content).split('\n')[0]).toBe('Do not use this walk. Ask Caretaker, telephone 7.')
  })

  it('marks a draft', async () => {
    const { files } = await done('sheet small.json --for reception --form text --out o --draft')
    expect(String(files[0]?.content)).toMatch(/^DRAFT: /)
  })
})

it('prints schemas from the validators', async () => {
  for (const of of ['survey', 'team', 'pack']) {
    const { out } = await done(`schema ${of}`)
    expect(JSON.stringify(JSON.parse(out))).toContain('"properties"')
  }
})

it('helps', async () => {
  for (const line of ['--help', 'assess --help']) expect((await done(line)).out).toContain('assess FILE\n')
})
