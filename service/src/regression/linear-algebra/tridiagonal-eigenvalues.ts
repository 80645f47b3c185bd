import type { Tridiagonal } from './tridiagonal';

const MOST_SWEEPS = 60;

/**
 * Eigenvalues of a symmetric tridiagonal matrix, ascending, by the implicit QL method without vectors
 * (Bowdler, Martin, Reinsch and Wilkinson 1968; EISPACK tql1). Cost O(n²).
 */
export function tridiagonalEigenvalues(form: Tridiagonal): Float64Array {
  const values = form.diagonal.slice();
  const couplings = form.offDiagonal.slice();
  for (let first = 0; first < values.length; first += 1) {
    for (let sweep = 0; sweep < MOST_SWEEPS; sweep += 1) {
      const last = firstSplit(values, couplings, first);
      if (last === first) break;
      sweepOnce(values, couplings, first, last);
    }
  }
  return values.sort();
}

function firstSplit(values: Float64Array, couplings: Float64Array, first: number): number {
  let last = first;
  while (last < values.length - 1) {
    const near = Math.abs(values[last]) + Math.abs(values[last + 1]);
    if (Math.abs(couplings[last]) <= Number.EPSILON * near) break;
    last += 1;
  }
  return last;
}

/** One implicit QL sweep with Wilkinson's shift on the block first … last. */
function sweepOnce(values: Float64Array, couplings: Float64Array, first: number, last: number): void {
  const ratio = (values[first + 1] - values[first]) / (2 * couplings[first]);
  const root = Math.hypot(ratio, 1);
  let shifted = values[last] - values[first] + couplings[first] / (ratio + (ratio >= 0 ? root : -root));
  let sine = 1;
  let cosine = 1;
  let carried = 0;
  for (let i = last - 1; i >= first; i -= 1) {
    const scaled = sine * couplings[i];
    const coupling = cosine * couplings[i];
    const length = Math.hypot(scaled, shifted);
    couplings[i + 1] = length;
    if (length === 0) {
      values[i + 1] -= carried;
      couplings[last] = 0;
      return;
    }
    sine = scaled / length;
    cosine = shifted / length;
    const difference = values[i + 1] - carried;
    const step = (values[i] - difference) * sine + 2 * cosine * coupling;
    carried = sine * step;
    values[i + 1] = difference + carried;
    shifted = cosine * step - coupling;
  }
  values[first] -= carried;
  couplings[first] = shifted;
  couplings[last] = 0;
}
