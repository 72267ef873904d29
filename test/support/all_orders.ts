/**
 * Mean and variance of a statistic over all orders of its values, counted one by one.
 *
 * @module
 */

/** Every order of `values`; n! of them, so for small n only. */
export function* ordersOf(values: readonly number[]): Generator<number[]> {
  if (values.length === 0) {
    yield [];
    return;
  }
  for (let first = 0; first < values.length; first++) {
    const rest = [...values.slice(0, first), ...values.slice(first + 1)];
    for (const order of ordersOf(rest)) yield [values[first], ...order];
  }
}

/** Mean and variance (divisor: how many there are) of numbers. */
export function momentsOf(numbers: Iterable<number>): { mean: number; variance: number } {
  const all = [...numbers];
  const mean = all.reduce((sum, each) => sum + each, 0) / all.length;
  return { mean, variance: all.reduce((sum, each) => sum + (each - mean) ** 2, 0) / all.length };
}
