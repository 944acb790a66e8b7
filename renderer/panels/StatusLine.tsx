import { formatPosition, formatQuantity } from '../../core/format/index.js';
import type { PixelPoint, Vec3 } from '../../core/geometry/index.js';

export interface StatusLineProps {
  /** What lies under the pointer or the caret; undefined when it is on neither plate. */
  readonly cursor:
    | {
        readonly positionMm?: Vec3;
        /** In place of the position, where the files have no pixel spacing. */
        readonly pixel?: PixelPoint;
        /** Pixel values there; null on padding, outside the image, or where there is no slice. */
        readonly soft: number | null;
        readonly sharp: number | null;
      }
    | undefined;
  readonly unit: string;
  /** One kernel alone is read. */
  readonly single: boolean;
  readonly message: { readonly text: string; readonly tone: 'plain' | 'warn' | 'bad' } | undefined;
}

/** The bottom line: values and place under the pointer, and the last message, which is also spoken. */
export function StatusLine({ cursor, unit, single, message }: StatusLineProps) {
  const value = (hu: number | null | undefined) => formatQuantity(hu, 'pixelHu');
  return (
    <footer class="status">
      <span>
        soft <span class="value">{value(cursor?.soft)}</span> {unit}
      </span>
      {!single && (
        <span>
          sharp <span class="value">{value(cursor?.sharp)}</span> {unit}
        </span>
      )}
      <span>{placeText(cursor)}</span>
      <span class="message" role="status" data-tone={message?.tone} title={message?.text}>
        {message?.text}
      </span>
    </footer>
  );
}

function placeText(cursor: StatusLineProps['cursor']): string {
  if (cursor?.positionMm !== undefined) return formatPosition(cursor.positionMm);
  if (cursor?.pixel === undefined) return '';
  return `column ${Math.round(cursor.pixel.column) + 1}, row ${Math.round(cursor.pixel.row) + 1}`;
}
