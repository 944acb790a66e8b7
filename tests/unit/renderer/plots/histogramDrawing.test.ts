import { describe, expect, it } from 'vitest';
import { histogramDrawing, histogramSummary } from '../../../../renderer/plots/histogramDrawing.js';

const histogram = { startHu: 100, binWidthHu: 10, soft: [1, 3, 0], sharp: [0, 2, 2] };

describe('histogramDrawing', () => {
  it('begins and ends each step line on the axis', () => {
    const { softLine, x, y } = histogramDrawing(histogram, 300, 200);
    expect(softLine.startsWith(`M${x(100)},${y(0)}`)).toBe(true);
    expect(softLine.endsWith(`L${x(130)},${y(0)}`)).toBe(true);
  });
  it('has room for the highest bin of either kernel', () => {
    const { y } = histogramDrawing({ ...histogram, sharp: [0, 40, 2] }, 300, 200);
    expect(y.domain()[1]).toBeGreaterThanOrEqual(40);
  });
  it('draws no line for a kernel without pixels', () => {
    expect(histogramDrawing({ ...histogram, sharp: [0, 0, 0] }, 300, 200).sharpLine).toBe('');
  });
});

describe('histogramSummary', () => {
  it('tells counts, range, mean and bins in words', () => {
    expect(histogramSummary(histogram, 'HU', 108.25, null)).toBe(
      'Soft: 4 pixels from 100 to 120 HU, mean 108.3. Sharp: 4 pixels from 110 to 130 HU. 3 bins of 10.0 HU.',
    );
  });
});
