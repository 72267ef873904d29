/**
 * The regularized incomplete beta function and its inverse, for binomial intervals.
 *
 * @module
 */

/**
 * Regularized incomplete beta function I_x(a, b): the probability that a Beta(a, b) variable is at most `x`.
 * For a, b >= 1, to about 1e-13 relative, also for parameters of ten million. Cost: about
 * sqrt(max(a, b)) steps of a continued fraction (DLMF 8.17.22, by the method of Lentz 1976).
 */
export function incompleteBeta(x: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  const front = betaFront(x, a, b);
  return x < (a + 1) / (a + b + 2)
    ? front * betaFraction(x, a, b) / a
    : 1 - front * betaFraction(1 - x, b, a) / b;
}

/** The `x` at which {@link incompleteBeta} is `probability`: bisection, then Newton's steps kept inside. */
export function inverseIncompleteBeta(probability: number, a: number, b: number): number {
  let low = 0, high = 1, x = a / (a + b);
  for (let step = 0; step < 200; step++) {
    const excess = incompleteBeta(x, a, b) - probability;
    if (excess > 0) high = x;
    else low = x;
    const slope = betaFront(x, a, b) / (x * (1 - x));
    const guess = x - excess / slope;
    const next = guess > low && guess < high ? guess : (low + high) / 2;
    if (Math.abs(next - x) <= 1e-15 * next) return next;
    x = next;
  }
  return x;
}

/**
 * x^a (1 - x)^b / B(a, b), written around its peak at a / (a + b) so that no digits cancel when a and b
 * are large (Loader 2000).
 */
function betaFront(x: number, a: number, b: number): number {
  const total = a + b;
  const offPeak = x * total - a;
  const power = a * Math.log1p(offPeak / a) + b * Math.log1p(-offPeak / b);
  const correction = stirlingError(total) - stirlingError(a) - stirlingError(b);
  return Math.exp(power + correction) * Math.sqrt(a * b / (2 * Math.PI * total));
}

/** ln Γ(x) less Stirling's formula for it, x >= 1. */
function stirlingError(x: number): number {
  if (x < 16) return stirlingError(x + 1) + (x + 0.5) * Math.log1p(1 / x) - 1;
  const square = x * x;
  return (1 / 12 -
    (1 / 360 - (1 / 1260 - (1 / 1680 - 1 / 1188 / square) / square) / square) / square) /
    x;
}

function betaFraction(x: number, a: number, b: number): number {
  const tiny = 1e-300;
  let c = 1, d = 1 / nonZero(1 - (a + b) * x / (a + 1), tiny), value = d;
  for (let m = 1; m < 100_000; m++) {
    const even = m * (b - m) * x / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / nonZero(1 + even * d, tiny);
    c = nonZero(1 + even / c, tiny);
    value *= c * d;
    const odd = -(a + m) * (a + b + m) * x / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / nonZero(1 + odd * d, tiny);
    c = nonZero(1 + odd / c, tiny);
    const step = c * d;
    value *= step;
    if (Math.abs(step - 1) < 1e-15) break;
  }
  return value;
}

function nonZero(value: number, tiny: number): number {
  return Math.abs(value) < tiny ? tiny : value;
}
