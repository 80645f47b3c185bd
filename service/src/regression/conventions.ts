/**
 * The conventions of the regression engine, stated once; every other file refers to this one.
 *
 * **Objective.** For n records with weights wᵢ scaled to sum to n,
 *
 *     minimise (1/2n) Σ wᵢ (yᵢ − b₀ − xᵢ·b)² + λ Σⱼ pⱼ [ α|bⱼ| + (1−α)/2 · bⱼ² ]
 *
 * The intercept b₀ is never penalised. Columns x are standardised by their weighted mean and their 1/n standard deviation
 * (without an intercept: not centred, scaled by the root mean square). α = 0 ridge, α = 1 lasso, between them elastic net,
 * λ = 0 least squares; pⱼ is the penalty factor of the column's input (0 = left free). The target is not rescaled.
 *
 * **Conversions**, on the same standardised columns: textbook "sum of squares + λ‖b‖²" has nλ (penaltyFromSumForm);
 * scikit-learn's Ridge has alpha = nλ, its Lasso and ElasticNet alpha = λ; glmnet rescales the target inside, so a λ given
 * to it for ridge means λ/sd(y) here, and its lasso λ is the same; the prior b ~ N(0, γ²) has γ² = σ²/(nλ).
 * (Hoerl and Kennard 1970; Tibshirani 1996; Zou and Hastie 2005; Friedman, Hastie and Tibshirani 2010, section 2.)
 *
 * **Categories.** All levels are kept under a penalty, so no level is a reference. For least squares, and for a category
 * with penalty factor 0, the commonest level is dropped (weight 0) and the others are differences from it. A level that a
 * training fold does not hold has weight 0 in that fold. The factor pⱼ applies to every column of the input.
 *
 * **Missing readings** under the rule "typical" take the training records' weighted mean (after the transform) and raise a
 * 0/1 indicator column; a missing category has all its level columns 0 and the indicator 1.
 *
 * **Inside the folds.** Means, scales, fills and spline knots come from the training part of each fold only; the 100 values
 * of λ come from all records and are the same in every fold.
 *
 * **Degrees of freedom** are counted without the intercept: the trace of the ridge hat matrix; for lasso the number of
 * weights that are not 0 (Zou, Hastie and Tibshirani 2007); for elastic net the ridge trace on the active columns.
 *
 * **Residual variance**: σ² = Σ w r² / (n − 1 − df) (n − df without an intercept).
 *
 * **Determinism.** Sums run in a fixed order that does not depend on the number of threads; random choices come from one
 * seeded generator (random.ts). Same records, specification and seed: same bits.
 */
export const PATH_LENGTH = 100;

/** Ridge path: from 1 % to 99.9 % of the degrees of freedom that the columns have. */
export const RIDGE_PATH_SHARE = { strongest: 0.01, weakest: 0.999 } as const;

/** Lasso path: smallest λ over largest, as glmnet has it (tall, wide). */
export const LASSO_PATH_RATIO = { tall: 1e-4, wide: 1e-2 } as const;

/** Relative duality gap at which coordinate descent stops. */
export const DUALITY_GAP = 1e-10;

/** λ of the stated objective from the textbook's sum form. */
export function penaltyFromSumForm(sumForm: number, recordCount: number): number {
  return sumForm / recordCount;
}
