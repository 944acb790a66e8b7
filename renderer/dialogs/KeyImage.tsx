import { useEffect, useRef } from 'preact/hooks';
import type { Raster } from '../../core/raster/index.js';
import { Dialog } from './Dialog.js';

export interface KeyImageProps {
  /** Name of the region. */
  readonly label: string;
  /** What the picture shows, in words. */
  readonly description: string;
  /** Undefined while its slices are read. */
  readonly picture: Raster | undefined;
  readonly problem: string | undefined;
  readonly onSave: () => void;
  readonly onClose: () => void;
}

/** The key image of a region as it goes into page and paper. */
export function KeyImage(props: KeyImageProps) {
  const { picture } = props;
  return (
    <Dialog
      title={`Key image of ${props.label}`}
      size="wide"
      onClose={props.onClose}
      foot={
        <>
          <span class="note" role="status">
            {props.problem ?? (picture === undefined ? 'Reading its slices' : '')}
          </span>
          <button
            type="button"
            class="button outlined"
            disabled={picture === undefined}
            onClick={props.onSave}
          >
            Save as PNG
          </button>
          <button type="button" class="button primary" onClick={props.onClose}>
            Close
          </button>
        </>
      }
    >
      {picture !== undefined && <Picture raster={picture} description={props.description} />}
    </Dialog>
  );
}

function Picture({
  raster,
  description,
}: {
  readonly raster: Raster;
  readonly description: string;
}) {
  const ref = useRef<HTMLCanvasElement>(null);
  const { width, height, rgb } = raster;
  useEffect(() => {
    const context = ref.current?.getContext('2d');
    if (context === null || context === undefined) return;
    const image = context.createImageData(width, height);
    for (let from = 0, to = 0; from < rgb.length; from += 3, to += 4) {
      image.data.set([rgb[from] ?? 0, rgb[from + 1] ?? 0, rgb[from + 2] ?? 0, 255], to);
    }
    context.putImageData(image, 0, 0);
  }, [raster]);
  return (
    <canvas
      ref={ref}
      class="key-image"
      width={width}
      height={height}
      role="img"
      aria-label={description}
    />
  );
}
