import { escapeHtml } from './escapeHtml.js';
import type { MeasurementTable } from './measurementTable.js';

/** Key images by the identifiers of their regions: PNG files in base64. */
export type PagePictures = ReadonlyMap<string, string>;

const BASE64 = /^[A-Za-z0-9+/]+={0,2}$/;

/** The key images, each under the name of its region; empty without any. */
export function pictureHtml({ rows }: MeasurementTable, pictures: PagePictures): string {
  const figures = rows.flatMap(({ id, item, label, place }) => {
    const png = item === 'region' ? pictures.get(id) : undefined;
    if (png === undefined) return [];
    if (!BASE64.test(png)) throw new RangeError(`picture of ${id} is not base64`);
    const name = escapeHtml(place === '' ? label : `${label}, ${place}`);
    return [
      `<figure><img alt="Key image of ${name}, soft and sharp kernel" src="data:image/png;base64,${png}"><figcaption>${name}</figcaption></figure>`,
    ];
  });
  return figures.length === 0 ? '' : `<h2>Key images</h2>\n${figures.join('\n')}\n`;
}
