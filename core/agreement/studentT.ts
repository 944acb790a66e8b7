/**
 * Quantiles of Student's t distribution, by bisection on its distribution function, which comes from the regularised
 * incomplete beta function (Abramowitz and Stegun 26.7.1, continued fraction 26.5.8 by the method of Lentz).
 */
export function studentTQuantile(probability: number, degrees: number): number {
  if (!(probability > 0 && probability < 1))
    throw new RangeError(`invalid probability: ${probability}`);
  if (!(degrees > 0)) throw new RangeError(`invalid degrees of freedom: ${degrees}`);
  if (probability < 0.5) return -studentTQuantile(1 - probability, degrees);
  return bisect((t) => studentT(t, degrees), probability);
}

/** Quantiles of the F distribution (Abramowitz and Stegun 26.6.2). */
export function fQuantile(probability: number, upper: number, lower: number): number {
  if (!(probability > 0 && probability < 1))
    throw new RangeError(`invalid probability: ${probability}`);
  const distribution = (x: number): number =>
    incompleteBeta((upper * x) / (upper * x + lower), upper / 2, lower / 2);
  return bisect(distribution, probability);
}

function studentT(t: number, degrees: number): number {
  const tail = incompleteBeta(degrees / (degrees + t * t), degrees / 2, 0.5) / 2;
  return t >= 0 ? 1 - tail : tail;
}

/** The x ≥ 0 at which a rising distribution function reaches a probability. */
function bisect(distribution: (x: number) => number, probability: number): number {
  let high = 1;
  while (distribution(high) < probability && high < 1e12) high *= 2;
  let low = 0;
  for (let step = 0; step < 200 && high - low > 1e-14 * high; step++) {
    const middle = (low + high) / 2;
    if (distribution(middle) < probability) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

function incompleteBeta(x: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  const front = Math.exp(
    logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x),
  );
  return x < (a + 1) / (a + b + 2)
    ? (front * betaFraction(x, a, b)) / a
    : 1 - (front * betaFraction(1 - x, b, a)) / b;
}

function betaFraction(x: number, a: number, b: number): number {
  const tiny = 1e-300;
  const guard = (value: number): number => (Math.abs(value) < tiny ? tiny : value);
  let c = 1;
  let d = 1 / guard(1 - ((a + b) * x) / (a + 1));
  let fraction = d;
  for (let m = 1; m <= 500; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / guard(1 + even * d);
    c = guard(1 + even / c);
    fraction *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / guard(1 + odd * d);
    c = guard(1 + odd / c);
    const step = d * c;
    fraction *= step;
    if (Math.abs(step - 1) < 1e-15) break;
  }
  return fraction;
}

/** ln Γ for positive arguments: Lanczos' approximation with g = 7 and nine coefficients (Godfrey 2001). */
function logGamma(x: number): number {
  const coefficients = [
    676.5203681218851, -1259.1392167224028, 771.3234287776531, -176.6150291621406,
    12.507343278686905, -0.13857109526572012, 9.984369578019572e-6, 1.5056327351493116e-7,
  ];
  if (x < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * x)) - logGamma(1 - x);
  const y = x - 1;
  const sum = coefficients.reduce(
    (total, coefficient, index) => total + coefficient / (y + index + 1),
    0.9999999999998099,
  );
  const t = y + 7.5;
  return 0.5 * Math.log(2 * Math.PI) + (y + 0.5) * Math.log(t) - t + Math.log(sum);
}
