/**
 * Values replaced by what a normal distribution would have in their place.
 *
 * @module
 */
import { ranks } from "./ranks.ts";

/**
 * Normal scores of Blom 1958: the standard normal quantile at (rank - 3/8) / (n + 1/4); equal values share a
 * score. They keep the order and take away skewness and outliers. Cost: one sort.
 */
export function normalScores(values: Float64Array): Float64Array {
  return ranks(values).map((rank) => normalQuantile((rank - 0.375) / (values.length + 0.25)));
}

/**
 * Quantile of the standard normal distribution, for 0 < p < 1.
 *
 * Source: algorithm AS 241 (PPND16) of Wichura 1988, Applied Statistics 37, 477–484; good to about 1e-16
 * relative.
 */
export function normalQuantile(p: number): number {
  const q = p - 0.5;
  if (Math.abs(q) <= 0.425) return q * ratio(CENTER, 0.180625 - q * q);
  const r = Math.sqrt(-Math.log(q < 0 ? p : 1 - p));
  const size = r <= 5 ? ratio(MIDDLE, r - 1.6) : ratio(FAR, r - 5);
  return q < 0 ? -size : size;
}

/** Coefficients of numerator and denominator, constant term first. */
type Rational = readonly [above: readonly number[], below: readonly number[]];

const CENTER: Rational = [
  [
    3.3871328727963666080e0,
    1.3314166789178437745e2,
    1.9715909503065514427e3,
    1.3731693765509461125e4,
    4.5921953931549871457e4,
    6.7265770927008700853e4,
    3.3430575583588128105e4,
    2.5090809287301226727e3,
  ],
  [
    1,
    4.2313330701600911252e1,
    6.8718700749205790830e2,
    5.3941960214247511077e3,
    2.1213794301586595867e4,
    3.9307895800092710610e4,
    2.8729085735721942674e4,
    5.2264952788528545610e3,
  ],
];

const MIDDLE: Rational = [
  [
    1.42343711074968357734e0,
    4.63033784615654529590e0,
    5.76949722146069140550e0,
    3.64784832476320460504e0,
    1.27045825245236838258e0,
    2.41780725177450611770e-1,
    2.27238449892691845833e-2,
    7.74545014278341407640e-4,
  ],
  [
    1,
    2.05319162663775882187e0,
    1.67638483018380384940e0,
    6.89767334985100004550e-1,
    1.48103976427480074590e-1,
    1.51986665636164571966e-2,
    5.47593808499534494600e-4,
    1.05075007164441684324e-9,
  ],
];

const FAR: Rational = [
  [
    6.65790464350110377720e0,
    5.46378491116411436990e0,
    1.78482653991729133580e0,
    2.96560571828504891230e-1,
    2.65321895265761230930e-2,
    1.24266094738807843860e-3,
    2.71155556874348757815e-5,
    2.01033439929228813265e-7,
  ],
  [
    1,
    5.99832206555887937690e-1,
    1.36929880922735805310e-1,
    1.48753612908506148525e-2,
    7.86869131145613259100e-4,
    1.84631831751005468180e-5,
    1.42151175831644588870e-7,
    2.04426310338993978564e-15,
  ],
];

function ratio([above, below]: Rational, x: number): number {
  return polynomial(above, x) / polynomial(below, x);
}

function polynomial(coefficients: readonly number[], x: number): number {
  return coefficients.reduceRight((sum, coefficient) => sum * x + coefficient, 0);
}
