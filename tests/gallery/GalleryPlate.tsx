import { useEffect, useRef } from 'preact/hooks';
import { ROLE_SIGNS } from '../../core/region/index.js';

interface GalleryPlateProps {
  readonly grain: number;
}

/** A drawn stand-in for a plate: discs, grain and marks, so that the panels can be judged beside grey levels. */
export function GalleryPlate({ grain }: GalleryPlateProps) {
  const canvas = useRef<HTMLCanvasElement>(null);
  useEffect(() => {
    const element = canvas.current;
    const context = element?.getContext('2d');
    if (!element || !context) return;
    element.width = element.clientWidth;
    element.height = element.clientHeight;
    draw(context, element.width, element.height, grain);
  });
  return <canvas class="gallery-plate" ref={canvas} />;
}

function draw(context: CanvasRenderingContext2D, w: number, h: number, grain: number): void {
  const disc = (x: number, y: number, r: number, grey: number) => {
    context.fillStyle = `rgb(${grey} ${grey} ${grey})`;
    context.beginPath();
    context.arc(x * w, y * h, r * h, 0, 7);
    context.fill();
  };
  context.fillStyle = '#080808';
  context.fillRect(0, 0, w, h);
  disc(0.45, 0.5, 0.72, 62);
  disc(0.3, 0.62, 0.2, 148);
  disc(0.58, -0.02, 0.12, 150);
  disc(0.71, 0.36, 0.075, 34);
  disc(0.71, 0.36, 0.02, 225);
  disc(0.71, 0.36, 0.009, 150);
  const image = context.getImageData(0, 0, w, h);
  let seed = 7;
  for (let i = 0; i < image.data.length; i += 4) {
    seed = (seed * 1103515245 + 12345) % 2147483648;
    const change = (seed / 2147483648 - 0.5) * grain;
    for (let c = 0; c < 3; c++) image.data[i + c] = (image.data[i + c] ?? 0) + change;
  }
  context.putImageData(image, 0, 0);
  const ring = (x: number, y: number, r: number, role: keyof typeof ROLE_SIGNS) => {
    context.strokeStyle = ROLE_SIGNS[role].colour;
    context.lineWidth = 1.6;
    context.setLineDash([...ROLE_SIGNS[role].dashPx]);
    context.beginPath();
    context.arc(x * w, y * h, r * h, 0, 7);
    context.stroke();
  };
  ring(0.71, 0.36, 0.016, 'lumen');
  ring(0.75, 0.36, 0.016, 'wall');
  ring(0.3, 0.62, 0.11, 'reference');
  ring(0.71, 0.42, 0.02, 'fat');
  ring(0.62, 0.5, 0.02, 'plaque');
}
