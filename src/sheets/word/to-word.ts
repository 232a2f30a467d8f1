import {
  AlignmentType,
  Document,
  Footer,
  Header,
  LevelFormat,
  LineRuleType,
  Packer,
  PageNumber,
  Paragraph,
  type Table,
  TextRun,
} from 'docx'
import type { Block, Outline, Section } from '../content/tree.ts'
import { tableOf } from './table.ts'
import { words, xmlText } from './xml-text.ts'

/** The ink of the printed sheet. */
const ink = '1B1F3B'
const bullets = 'bullets'

/**
 * A sheet as a word-processor file: heading styles, true lists, tables whose head row is marked and repeated, language, title,
 * DRAFT at the head of every page of a draft, page numbers at its foot. Whatever a name holds is text in it.
 */
export async function toWord(outline: Outline): Promise<Uint8Array> {
  // Half points: large clear print for those who walk, 12 point for those who read at a desk.
  const size = outline.reader === 'client' || outline.reader === 'reception' ? 28 : 24
  const file = new Document({
    title: xmlText(outline.title),
    creator: 'Tautline',
    lastModifiedBy: 'Tautline',
    styles: stylesOf(outline.lang, size),
    numbering: {
      config: [
        {
          reference: bullets,
          levels: [
            {
              level: 0,
              format: LevelFormat.BULLET,
              text: '•',
              alignment: AlignmentType.LEFT,
              style: { paragraph: { indent: { left: 440, hanging: 300 } } },
            },
          ],
        },
      ],
    },
    sections: [
      {
        headers: {
          default: new Header({ children: outline.draft ? [new Paragraph({ children: [words('DRAFT', true)] })] : [] }),
        },
        footers: { default: new Footer({ children: [foot(outline.title)] }) },
        children: [
          heading(outline.heading, 1),
          ...outline.blocks.flatMap(blockOf),
          ...outline.sections.flatMap((section) => sectionOf(section, 2)),
        ],
      },
    ],
  })
  return new Uint8Array(await Packer.toArrayBuffer(file))
}

type Piece = Paragraph | Table

function sectionOf(section: Section, level: number): Piece[] {
  return [
    heading(section.heading, level),
    ...section.blocks.flatMap(blockOf),
    ...section.sections.flatMap((one) => sectionOf(one, level + 1)),
  ]
}

function heading(text: string, level: number): Paragraph {
  return new Paragraph({
    style: `Heading${Math.min(level, 6)}`,
    keepNext: true,
    children: [words(text)],
  })
}

function blockOf(block: Block): Piece[] {
  switch (block.kind) {
    case 'paragraph':
      return [new Paragraph({ children: [words(block.line.text)] })]
    case 'verdict':
      return [new Paragraph({ style: 'Verdict', children: [words(`Verdict: ${block.text}`)] })]
    case 'list':
      return block.items.map(
        ({ text }) => new Paragraph({ numbering: { reference: bullets, level: 0 }, children: [words(text)] }),
      )
    case 'table':
      // A table at the end of a file needs a paragraph after it.
      return [
        new Paragraph({ style: 'TableCaption', keepNext: true, children: [words(block.caption)] }),
        tableOf(block),
        new Paragraph({}),
      ]
  }
}

function foot(title: string): Paragraph {
  return new Paragraph({
    children: [
      new TextRun({ children: ['Page ', PageNumber.CURRENT, ' of ', PageNumber.TOTAL_PAGES] }),
      words(`. ${title}`),
    ],
  })
}

function stylesOf(lang: string, size: number) {
  const headingRun = (more: number) => ({ run: { size: size + more, bold: true, color: ink } })
  const spaced = { paragraph: { spacing: { before: 280, after: 100 } } }
  const paragraphStyle = (id: string, name: string, more: number) => ({
    id,
    name,
    basedOn: 'Normal',
    next: 'Normal',
    quickFormat: true,
    ...headingRun(more),
  })
  return {
    default: {
      document: {
        run: { size, font: 'Arial', color: ink, language: { value: lang } },
        paragraph: { spacing: { line: 360, lineRule: LineRuleType.AUTO, after: 80 } },
      },
      heading1: { ...headingRun(24), paragraph: { spacing: { line: 280, lineRule: LineRuleType.AUTO, after: 120 } } },
      heading2: { ...headingRun(12), ...spaced },
      heading3: { ...headingRun(6), ...spaced },
      heading4: { ...headingRun(2), ...spaced },
      heading5: { ...headingRun(2), ...spaced },
      heading6: { ...headingRun(2), ...spaced },
    },
    paragraphStyles: [paragraphStyle('Verdict', 'Verdict', 8), paragraphStyle('TableCaption', 'Table caption', 0)],
  }
}
