import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import pdfmake from 'pdfmake';
import type { Content, TableCell, TDocumentDefinitions } from 'pdfmake/interfaces.js';
import type { PdfCell, PdfDocument, PdfPart } from '../../../core/report/pdf/index.js';
import { printableText } from './printableText.js';

const FONTS = join(
  dirname(createRequire(import.meta.url).resolve('pdfmake/package.json')),
  'fonts',
  'Roboto',
);
const FONT_FILES = {
  normal: join(FONTS, 'Roboto-Regular.ttf'),
  bold: join(FONTS, 'Roboto-Medium.ttf'),
};

/** A4 with these margins, pt: left, top, right, bottom. */
const MARGINS: [number, number, number, number] = [40, 52, 40, 52];
const TEXT_WIDTH_PT = 595.28 - MARGINS[0] - MARGINS[2];

let isReady = false;

/** Fonts come from the package, and nothing else is ever read or fetched, whatever a note's text says. */
function prepare(): void {
  if (isReady) return;
  pdfmake.addFonts({ Roboto: FONT_FILES });
  pdfmake.setUrlAccessPolicy(() => false);
  pdfmake.setLocalAccessPolicy((path) => Object.values(FONT_FILES).includes(path));
  isReady = true;
}

/**
 * A document as PDF bytes: A4, fonts embedded, text searchable. Letters that the font has not are written as their
 * code points.
 *
 * @param pictures PNG files by the names that the document uses
 * @param createdAt time of the export, ISO 8601
 */
export async function toPdf(
  document: PdfDocument,
  pictures: ReadonlyMap<string, Uint8Array>,
  createdAt: string,
): Promise<Uint8Array> {
  prepare();
  const definition: TDocumentDefinitions = {
    info: { title: printableText(document.title), creationDate: new Date(createdAt) },
    pageSize: 'A4',
    pageMargins: MARGINS,
    defaultStyle: { font: 'Roboto', fontSize: 9, lineHeight: 1.15 },
    styles: STYLES,
    images: Object.fromEntries([...pictures].map(([name, png]) => [name, dataUrl(png)])),
    header: { text: printableText(document.head), style: 'edge', margin: [40, 24, 40, 0] },
    footer: (page: number, pages: number) => ({
      margin: [40, 14, 40, 0],
      columns: [
        { text: printableText(document.foot), style: 'edge' },
        { text: `${page} of ${pages}`, style: 'edge', alignment: 'right', width: 50 },
      ],
    }),
    content: [
      { text: printableText(document.title), style: 'title' },
      ...document.parts.flatMap(contentOf),
    ],
  };
  return new Uint8Array(await pdfmake.createPdf(definition).getBuffer());
}

const STYLES: NonNullable<TDocumentDefinitions['styles']> = {
  title: { fontSize: 15, bold: true, margin: [0, 0, 0, 8] },
  heading: { fontSize: 12, bold: true, margin: [0, 12, 0, 4] },
  subheading: { fontSize: 10, bold: true, margin: [0, 8, 0, 3] },
  small: { fontSize: 8, color: '#444444', margin: [0, 2, 0, 2] },
  caution: { fontSize: 8, color: '#5a3300', margin: [0, 0, 0, 1] },
  edge: { fontSize: 7.5, color: '#555555' },
  cell: { fontSize: 8 },
  headCell: { fontSize: 8, bold: true },
};

function contentOf(part: PdfPart): Content[] {
  switch (part.kind) {
    case 'heading':
    case 'subheading':
    case 'small':
      return [{ text: printableText(part.text), style: part.kind }];
    case 'line':
      return [{ text: printableText(part.text), margin: [0, 2, 0, 2] }];
    case 'cautions':
      return part.lines.map((text) => ({ text: printableText(text), style: 'caution' }));
    case 'picture':
      return [{ image: part.name, width: TEXT_WIDTH_PT, margin: [0, 2, 0, 4] }];
    case 'together':
      return [{ unbreakable: true, stack: part.parts.flatMap(contentOf) }];
    case 'table': {
      const shares = part.widths.reduce((sum, share) => sum + share, 0);
      return [
        {
          layout: 'lightHorizontalLines',
          margin: [0, 2, 0, 4],
          table: {
            headerRows: part.rows[0]?.some(({ look }) => look.toLowerCase().endsWith('head'))
              ? 1
              : 0,
            widths: part.widths.map((share) =>
              share === 0 ? 'auto' : shares === share ? '*' : `${(share / shares) * 55}%`,
            ),
            body: part.rows.map((row) => row.map(cellOf)),
          },
        },
      ];
    }
  }
}

function cellOf({ text, look }: PdfCell): TableCell {
  return {
    text: printableText(text),
    style: look === 'head' || look === 'numberHead' ? 'headCell' : 'cell',
    alignment: look === 'number' || look === 'numberHead' ? 'right' : 'left',
  };
}

function dataUrl(png: Uint8Array): string {
  return `data:image/png;base64,${Buffer.from(png).toString('base64')}`;
}
