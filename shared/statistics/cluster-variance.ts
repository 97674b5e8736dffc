/**
 * Variance of a pooled rate when answers come in clusters that may be alike inside: by listener, or by trial.
 *
 * @param residuals for each cluster, its right answers less what the pooled rate expects of its answers; at least two
 * @param answers   answers in all, above 0
 * @returns m/(m - 1) times the sum of squares over the squared number of answers
 * @throws RangeError with fewer than two clusters
 * @example clusterVariance([2, -2], 8) // 2/1 * 8 / 64 = 0.25
 * @see Cochran, Sampling Techniques, 3rd ed. (1977), sec. 3.12, on the ratio of two sums
 */
export function clusterVariance(residuals: readonly number[], answers: number): number {
  const clusters = residuals.length;
  if (clusters < 2) throw new RangeError(`a variance needs two clusters at least, not ${clusters}`);
  const squares = residuals.reduce((sum, residual) => sum + residual * residual, 0);
  return ((clusters / (clusters - 1)) * squares) / (answers * answers);
}

/**
 * A cluster's right answers less what the pooled rate expects of it, from whole numbers: exactly 0 where it has its share.
 *
 * Taken as right - answers * rate it would be some 1e-16 where nothing varies, and an interval of no width would stand for
 * one that cannot be had.
 *
 * @param right    right answers of the cluster, whole
 * @param answers  its answers, whole
 * @param allRight right answers in all, whole
 * @param all      answers in all, whole, at least 1
 * @example residual(5, 6, 10, 12) // 0
 */
export function residual(right: number, answers: number, allRight: number, all: number): number {
  return (right * all - answers * allRight) / all;
}
