import type { Block, Line, Outline, Section } from './tree.ts'

export interface Finding {
  /** Heading it stands under. */
  where: string
  text: string
  problem: string
  /** What the surveyor must add or change. */
  whatToDo: string
}

const mostWords = 15
const mostFacts = 4

/** Words that mean nothing to a reader who does not look, or only point. */
const vague = [
  'over there',
  'over here',
  'there',
  'here',
  'see',
  'look',
  'looks',
  'a bit',
  'a little way',
  "can't miss",
  'cannot miss',
  'obvious',
  'nearby',
  'close by',
  'down the way',
  'further on',
  'across from',
  'next to',
  'over yonder',
]
const colours =
  'black blue brown colour coloured gold green grey gray orange pink purple red silver violet white yellow'.split(' ')
/** What tells by hand, foot, ear or nose. */
const sensed =
  /\b(feel|felt|hear|heard|sound|smell|echo|hum|music|rattle|ring|click|warm|cool|cold|draught|wind|air|mat|carpet|tile|stone|wood|metal|plaster|brick|gravel|grass|rail|wall|edge|kerb|lip|ridge|ridges|ribbed|bump|bumps|rough|smooth|soft|hard|bench|chair|counter|door|handle|curtain|leather|cloth|hand|foot|knee|hip)\b/i

/** Refuses words that a client's sheet may not have. Empty: nothing to correct. */
export function lint(outline: Outline): Finding[] {
  const { heading, blocks, sections } = outline
  return lintSection({ heading, blocks, sections }, outline.reader === 'client')
}

function lintSection(section: Section, forClient: boolean): Finding[] {
  const where = section.heading
  const facts = section.blocks.reduce((sum, block) => sum + (block.kind === 'list' ? block.items.length : 0), 0)
  const crowded: Finding[] =
    section.part && facts > mostFacts
      ? [{ where, text: where, problem: `${facts} facts in one part`, whatToDo: 'cut the segment in two' }]
      : []
  return [
    ...[{ text: where }, ...section.blocks.flatMap(linesOf)].flatMap((line) => lintLine(line, where, forClient)),
    ...crowded,
    ...section.sections.flatMap((inner) => lintSection(inner, forClient)),
  ]
}

function linesOf(block: Block): Line[] {
  if (block.kind === 'paragraph') return [block.line]
  if (block.kind === 'verdict') return [{ text: block.text }]
  return block.kind === 'list' ? block.items : block.rows.flat().map((text) => ({ text }))
}

function lintLine(line: Line, where: string, forClient: boolean): Finding[] {
  const { text } = line
  if (line.missing) return [{ where, text, problem: 'missing', whatToDo: `add the ${line.from ?? 'missing words'}` }]
  const source = line.from ? ` in the ${line.from}` : ''
  const findings: Finding[] = []
  const add = (problem: string, act: string) => findings.push({ where, text, problem, whatToDo: `${act}${source}` })
  const word = vagueWord(text)
  if (word) add(`vague: "${word}"`, 'say it by side, clock face and distance, with what hand, foot, ear or nose meets')
  for (const sentence of sentencesIn(text)) {
    const words = wordsIn(sentence)
    if (words > mostWords) add(`${words} words in one sentence`, `say it in ${mostWords} words or two sentences`)
    const colour = colourAlone(sentence)
    if (colour) add(`colour alone: "${colour}"`, 'add what hand, foot, ear or nose meets')
  }
  const figure = forClient ? unfit.find(({ pattern }) => pattern.test(text)) : undefined
  if (figure) add(figure.problem, 'say it in plain words')
  return findings
}

const unfit = [
  { pattern: /\d\s*mm\b|\bmillimet/i, problem: 'millimetres' },
  { pattern: /\bclause\b|§/i, problem: 'a clause' },
  { pattern: /\bratio\b|\b1\s*:\s*\d/i, problem: 'a ratio' },
  { pattern: /\bscored?\b/i, problem: 'a score' },
]

function vagueWord(text: string): string | null {
  const plain = ` ${bare(text)
    .toLowerCase()
    .replace(/[^\p{L}\p{N}']+/gu, ' ')} `
  return vague.find((word) => plain.includes(` ${word} `)) ?? null
}

/** A colour that carries the sentence. Inside a proper name ("the Green Room") it is a name. */
function colourAlone(sentence: string): string | null {
  const words = bare(sentence)
    .split(/[^\p{L}']+/u)
    .filter((word) => word !== '')
  const colour = words.find((word, i) => colours.includes(word.toLowerCase()) && (i === 0 || !/^\p{Lu}/u.test(word)))
  return colour && !sensed.test(sentence) ? colour : null
}

export function sentencesIn(text: string): string[] {
  return bare(text)
    .split(/(?<=[.!?…])["”)]*\s+/u)
    .filter((sentence) => sentence.trim() !== '')
}

export function wordsIn(sentence: string): number {
  return sentence.split(/\s+/u).filter((word) => /[\p{L}\p{N}]/u.test(word)).length
}

function bare(text: string): string {
  return text.replace(/[\u2068\u2069]/gu, '').replace(/^DRAFT: /, '')
}
