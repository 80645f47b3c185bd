import { pairMoments, type PairMoments } from '../findings/robust';

/**
 * Moments of two columns gathered block by block. Two parts with counts a and b and means differing by δ join as
 * Sxy = Sxy(a) + Sxy(b) + δx δy ab / (a + b) (Chan, Golub, LeVeque 1983, "Algorithms for computing the sample
 * variance", eq. 2.1; for products Pébay 2008, Sandia report SAND2008-6212, eq. 3.11).
 */
export class PairSums {
  count = 0;
  private meanX = 0;
  private meanY = 0;
  private squaresX = 0;
  private squaresY = 0;
  private products = 0;

  addBlock(x: Float64Array, y: Float64Array): void {
    const block = pairMoments(x, y);
    if (block.count > 0) this.join(block);
  }

  private join({ count, meanX, meanY, sdX, sdY, covariance }: PairMoments): void {
    const [fromX, fromY] = [meanX - this.meanX, meanY - this.meanY];
    const together = this.count + count;
    const share = (this.count * count) / together;
    this.squaresX += count * sdX * sdX + fromX * fromX * share;
    this.squaresY += count * sdY * sdY + fromY * fromY * share;
    this.products += count * covariance + fromX * fromY * share;
    // In this order of reckoning a column that does not vary keeps its mean exactly.
    this.meanX += fromX * (count / together);
    this.meanY += fromY * (count / together);
    this.count = together;
  }

  /** Pearson's correlation; null where one of the two does not vary. */
  get correlation(): number | null {
    const correlation = this.products / (Math.sqrt(this.squaresX) * Math.sqrt(this.squaresY));
    if (!Number.isFinite(correlation)) return null;
    return Math.max(-1, Math.min(1, correlation));
  }
}
