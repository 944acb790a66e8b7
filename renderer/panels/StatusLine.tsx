import { formatPosition, formatQuantity } from '../../core/format/index.js';
import type { Vec3 } from '../../core/geometry/index.js';

export interface StatusLineProps {
  /** What lies under the pointer or the caret; undefined when it is on neither plate. */
  readonly cursor:
    | {
        readonly positionMm: Vec3;
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
      <span>{cursor ? formatPosition(cursor.positionMm) : ''}</span>
      <span class="message" role="status" data-tone={message?.tone} title={message?.text}>
        {message?.text}
      </span>
    </footer>
  );
}
