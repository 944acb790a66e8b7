/** A rectangle of pixels from which noise power was measured, and the lattice of its transform. */
export interface AreaSize {
  readonly columns: number;
  readonly rows: number;
  readonly latticeColumns: number;
  readonly latticeRows: number;
  readonly spacingMm: readonly [number, number];
}

/** How much of the power at a ring's frequency an area shows in each of the lowest rings. */
export interface RingResponse {
  /** response[shown][true] for shown rings 0 … LOW_RINGS − 1: mean power that is shown per power that is there. */
  readonly response: readonly Float64Array[];
  /** Places of the lattice in each of the shown rings. */
  readonly weight: Float64Array;
}

/** Rings below this one are told apart from what an area shows of them; above, an area shows what is there. */
export const LOW_RINGS = 10;
/** Waves are summed in steps of this part of a ring: the response is smooth on that scale. */
const STEPS_PER_RING = 4;
/** Directions within a quarter turn, the other quarters mirror it: for waves of the lowest rings, and for others. */
const DIRECTIONS = [16, 4] as const;

/**
 * What detrending and the size of an area do to noise of one frequency. A small area can't tell frequencies closer
 * than 1/size apart, and the second-order surface that is taken away takes most of the power below that with it
 * (AAPM report 233, 2019, warns of both). Noise is a sum of independent waves, so what each wave of a ring leaves in
 * the rings of the measured spectrum, added up over directions, tells it exactly.
 *
 * @param rings rings of the whole spectrum, k·stepPerMm, k = 0 … rings − 1
 */
export function ringResponse(size: AreaSize, stepPerMm: number, rings: number): RingResponse {
  const key = [JSON.stringify(size), stepPerMm, rings].join();
  const known = KNOWN.get(key);
  if (known !== undefined) return known;
  const made = computed(size, stepPerMm, rings);
  // A few grids are in use at a time.
  if (KNOWN.size > 16) KNOWN.clear();
  KNOWN.set(key, made);
  return made;
}

const KNOWN = new Map<string, RingResponse>();

function computed(size: AreaSize, stepPerMm: number, rings: number): RingResponse {
  const x = axisOf(size.columns, size.latticeColumns, size.spacingMm[0]);
  const y = axisOf(size.rows, size.latticeRows, size.spacingMm[1]);
  const low = Math.min(LOW_RINGS, rings);
  const places = lowPlaces(x, y, stepPerMm, low);
  const weight = new Float64Array(low);
  for (const { ring, share } of places) spread(weight, ring, share, 1);
  const response = Array.from({ length: low }, () => new Float64Array(rings));
  const width = stepPerMm / STEPS_PER_RING;
  for (let step = 0; step < (rings - 1) * STEPS_PER_RING; step += 1) {
    const frequency = (step + 0.5) * width;
    const ring = Math.floor(frequency / stepPerMm);
    const share = frequency / stepPerMm - ring;
    const directions = DIRECTIONS[ring < low ? 0 : 1];
    const shown = new Float64Array(low);
    for (let direction = 0; direction < directions; direction += 1) {
      const angle = ((direction + 0.5) / directions) * (Math.PI / 2);
      const across = waveOn(x, frequency * Math.cos(angle));
      const down = waveOn(y, frequency * Math.sin(angle));
      addShown(shown, places, { x, y, across, down });
    }
    const area = (2 * Math.PI * frequency * width) / directions;
    response.forEach((row, index) => {
      const count = weight[index] as number;
      if (count > 1e-6) spread(row, ring, share, (area * (shown[index] as number)) / count);
    });
  }
  return { response, weight };
}

/** Shares a value between a ring and the next one, where there is a next one. */
function spread(rings: Float64Array, ring: number, share: number, value: number): void {
  rings[ring] = (rings[ring] as number) + (1 - share) * value;
  if (ring + 1 < rings.length) rings[ring + 1] = (rings[ring + 1] as number) + share * value;
}

/** A place of the lattice that counts to the lowest rings, shared between two as ringSums shares it. */
interface LowPlace {
  readonly column: number;
  readonly row: number;
  readonly ring: number;
  readonly share: number;
}

function lowPlaces(x: Axis, y: Axis, stepPerMm: number, low: number): readonly LowPlace[] {
  const frequency = ({ lattice, spacingMm }: Axis, index: number): number =>
    (index <= lattice / 2 ? index : index - lattice) / (lattice * spacingMm);
  const places: LowPlace[] = [];
  for (let row = 0; row < y.lattice; row += 1)
    for (let column = 0; column < x.lattice; column += 1) {
      const at = Math.hypot(frequency(x, column), frequency(y, row)) / stepPerMm;
      const ring = Math.floor(at);
      if (ring < low) places.push({ column, row, ring, share: at - ring });
    }
  return places;
}

/** One side of an area: places of its pixels, orthonormal polynomials on them, and the transforms of these. */
interface Axis {
  readonly count: number;
  readonly lattice: number;
  readonly spacingMm: number;
  readonly polynomials: readonly Float64Array[];
  readonly transforms: readonly Complex[];
}

interface Complex {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

function axisOf(count: number, lattice: number, spacingMm: number): Axis {
  const places = Float64Array.from({ length: count }, (_, index) => index - (count - 1) / 2);
  const meanSquare = places.reduce((sum, place) => sum + place * place, 0) / count;
  const polynomials = [
    places.map(() => 1),
    places,
    places.map((place) => place * place - meanSquare),
  ].map(normalised);
  const transforms = polynomials.map((values) => transformOf(values, undefined, lattice));
  return { count, lattice, spacingMm, polynomials, transforms };
}

function normalised(values: Float64Array): Float64Array {
  const length = Math.sqrt(values.reduce((sum, value) => sum + value * value, 0));
  return values.map((value) => (length > 1e-9 ? value / length : 0));
}

/** Discrete transform of a short list on a longer lattice, by its definition. */
function transformOf(re: Float64Array, im: Float64Array | undefined, lattice: number): Complex {
  const out = { re: new Float64Array(lattice), im: new Float64Array(lattice) };
  for (let k = 0; k < lattice; k += 1) {
    let [a, b] = [0, 0];
    for (let n = 0; n < re.length; n += 1) {
      const angle = (-2 * Math.PI * k * n) / lattice;
      const [c, s] = [Math.cos(angle), Math.sin(angle)];
      const [r, i] = [re[n] as number, im?.[n] ?? 0];
      a += r * c - i * s;
      b += r * s + i * c;
    }
    out.re[k] = a;
    out.im[k] = b;
  }
  return out;
}

/** A wave along one side: its transform, and its part in each polynomial. */
interface AxisWave {
  readonly transform: Complex;
  readonly parts: readonly (readonly [number, number])[];
}

/** The transform of a cut wave is a sum of a geometric row: sin(nφ)/sin(φ) with its phase. */
function waveOn(axis: Axis, frequencyPerMm: number): AxisWave {
  const { count, lattice, spacingMm, polynomials } = axis;
  const turn = 2 * Math.PI * frequencyPerMm * spacingMm;
  const transform = { re: new Float64Array(lattice), im: new Float64Array(lattice) };
  for (let k = 0; k < lattice; k += 1) {
    const half = (turn - (2 * Math.PI * k) / lattice) / 2;
    const below = Math.sin(half);
    const size = Math.abs(below) < 1e-12 ? count : Math.sin(count * half) / below;
    // Phase of Σ exp(2i·half·n) is (count − 1)·half; the wave itself is counted from the middle.
    const phase = (count - 1) * half - (turn * (count - 1)) / 2;
    transform.re[k] = size * Math.cos(phase);
    transform.im[k] = size * Math.sin(phase);
  }
  const parts = polynomials.map((values): readonly [number, number] => {
    let [re, im] = [0, 0];
    for (let n = 0; n < count; n += 1) {
      const angle = turn * (n - (count - 1) / 2);
      re += (values[n] as number) * Math.cos(angle);
      im += (values[n] as number) * Math.sin(angle);
    }
    return [re, im];
  });
  return { transform, parts };
}

/** Pairs of polynomials across and down that make the second-order surface of detrendQuadratic. */
const SURFACE = [
  [0, 0],
  [1, 0],
  [0, 1],
  [1, 1],
  [2, 0],
  [0, 2],
] as const;

/** Adds what an area shows of one wave in the lowest rings. */
function addShown(
  shown: Float64Array,
  places: readonly LowPlace[],
  {
    x,
    y,
    across,
    down,
  }: {
    readonly x: Axis;
    readonly y: Axis;
    readonly across: AxisWave;
    readonly down: AxisWave;
  },
): void {
  const scale = (x.spacingMm * y.spacingMm) / (x.count * y.count);
  let surface: readonly (readonly [number, number])[] = [];
  let surfaceOf = -1;
  for (const { column, row, ring, share } of places) {
    if (surfaceOf !== row) {
      surface = [0, 1, 2].map((order) => surfaceRow(order, across, down, y, row));
      surfaceOf = row;
    }
    const [eRe, eIm] = [down.transform.re[row] as number, down.transform.im[row] as number];
    const [wRe, wIm] = [
      across.transform.re[column] as number,
      across.transform.im[column] as number,
    ];
    let re = wRe * eRe - wIm * eIm;
    let im = wRe * eIm + wIm * eRe;
    for (let order = 0; order < 3; order += 1) {
      const q = x.transforms[order] as Complex;
      const [a, b] = surface[order] as readonly [number, number];
      const [qRe, qIm] = [q.re[column] as number, q.im[column] as number];
      re -= qRe * a - qIm * b;
      im -= qRe * b + qIm * a;
    }
    spread(shown, ring, share, scale * (re * re + im * im));
  }
}

/** What multiplies the polynomial of this order across, at one row of the lattice. */
function surfaceRow(
  order: number,
  across: AxisWave,
  down: AxisWave,
  y: Axis,
  row: number,
): readonly [number, number] {
  let [re, im] = [0, 0];
  for (const [i, j] of SURFACE) {
    if (i !== order) continue;
    const [aRe, aIm] = across.parts[i] as readonly [number, number];
    const [bRe, bIm] = down.parts[j] as readonly [number, number];
    const [cRe, cIm] = [aRe * bRe - aIm * bIm, aRe * bIm + aIm * bRe];
    const q = y.transforms[j] as Complex;
    re += cRe * (q.re[row] as number) - cIm * (q.im[row] as number);
    im += cRe * (q.im[row] as number) + cIm * (q.re[row] as number);
  }
  return [re, im];
}
