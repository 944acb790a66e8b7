export * from './pdfDocument.js';
export * from './pdfParts.js';
