/** x ← √w (x − mean)/sd in place; two passes; NaN becomes 0 (the mean). Returns centre and scale (0 for a constant column). */
export function standardiseColumn(
  values: Float64Array,
  rootWeights: Float64Array,
  centred: boolean,
  reference: boolean,
): [number, number] {
  const centre = weightedMean(values, rootWeights);
  let squares = 0;
  let weightSum = 0;
  let constant = true;
  let first = NaN;
  for (let row = 0; row < values.length; row += 1) {
    const weight = rootWeights[row] * rootWeights[row];
    weightSum += weight;
    const value = values[row];
    if (Number.isNaN(value)) continue;
    if (Number.isNaN(first)) first = value;
    if (value !== first) constant = false;
    const deviation = value - (centred ? centre : 0);
    squares += weight * deviation * deviation;
  }
  const shift = centred ? centre : 0;
  const scale = reference || (constant && (centred || first === 0)) ? 0 : Math.sqrt(squares / weightSum);
  for (let row = 0; row < values.length; row += 1) {
    const value = Number.isNaN(values[row]) ? centre : values[row];
    values[row] = scale === 0 ? 0 : ((value - shift) / scale) * rootWeights[row];
  }
  return [scale === 0 && !centred ? 0 : shift, scale];
}

/** Mean relative to the first reading, so that huge offsets lose no digits. */
function weightedMean(values: Float64Array, rootWeights: Float64Array): number {
  let sum = 0;
  let weightSum = 0;
  let origin = NaN;
  for (let row = 0; row < values.length; row += 1) {
    const value = values[row];
    if (Number.isNaN(value)) continue;
    if (Number.isNaN(origin)) origin = value;
    const weight = rootWeights[row] * rootWeights[row];
    sum += weight * (value - origin);
    weightSum += weight;
  }
  return origin + sum / weightSum;
}

export function centreTarget(target: Float64Array, rootWeights: Float64Array, centred: boolean): number {
  const centre = centred ? weightedMean(target, rootWeights) : 0;
  for (let row = 0; row < target.length; row += 1) target[row] = (target[row] - centre) * rootWeights[row];
  return centre;
}
