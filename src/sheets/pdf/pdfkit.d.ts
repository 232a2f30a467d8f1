/** What the PDF form uses of pdfkit 0.20: the package brings no types of its own. */
declare module 'pdfkit' {
  export class StructureElement {
    add(child: StructureElement | (() => void)): this
    end(): void
  }

  export interface TextOptions {
    width?: number
    height?: number
    lineBreak?: boolean
    lineGap?: number
    ellipsis?: boolean
    align?: 'left' | 'right'
  }

  export interface OutlineItem {
    addItem(title: string): OutlineItem
  }

  export default class PDFDocument {
    constructor(options: {
      pdfVersion: '1.7'
      subset: 'PDF/UA'
      tagged: true
      lang: string
      displayTitle: true
      info: { Title: string; Creator: string; Producer: string; CreationDate: Date }
      font: null
      autoFirstPage: false
      bufferPages: true
    })
    x: number
    y: number
    page: { width: number; height: number; margins: { bottom: number } }
    outline: OutlineItem
    /** The face in use. */
    _font: { font: { hasGlyphForCodePoint(point: number): boolean } }
    appendXML(xml: string, newline?: boolean): void
    registerFont(name: string, source: Uint8Array): this
    font(name: string): this
    fontSize(size: number): this
    fillColor(colour: string): this
    strokeColor(colour: string): this
    lineWidth(width: number): this
    text(text: string, x: number, y: number, options?: TextOptions): this
    heightOfString(text: string, options?: TextOptions): number
    widthOfString(text: string): number
    rect(x: number, y: number, width: number, height: number): this
    circle(x: number, y: number, radius: number): this
    polygon(...points: [number, number][]): this
    moveTo(x: number, y: number): this
    lineTo(x: number, y: number): this
    dash(length: number): this
    undash(): this
    fill(colour?: string): this
    stroke(): this
    struct(
      type: string,
      children?: (() => void) | { scope?: 'Row' | 'Column'; alt?: string; bbox?: number[] },
    ): StructureElement
    addStructure(element: StructureElement): this
    markContent(tag: 'Artifact', options: { type: 'Pagination' | 'Layout' }): this
    endMarkedContent(): this
    addPage(options: {
      size: [number, number]
      margins: { top: number; bottom: number; left: number; right: number }
    }): this
    /** Another of the same kind. */
    continueOnNewPage(): this
    bufferedPageRange(): { start: number; count: number }
    switchToPage(index: number): void
    end(): void
  }
}

declare module 'pdfkit/output' {
  import type PDFDocument from 'pdfkit'
  export function toBytes(document: PDFDocument): Promise<Uint8Array>
}
