import PDFDocument from 'pdfkit'

export const page = PDFDocument
