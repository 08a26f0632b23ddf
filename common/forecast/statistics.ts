/** The value that a share of sorted values does not exceed: the least value with at least that share at or below it. */
export function quantileOf(sorted: ArrayLike<number>, share: number): number {
  const at = Math.ceil(share * sorted.length - 1e-9) - 1;
  return sorted[Math.min(sorted.length - 1, Math.max(0, at))];
}

/** Ranks of values from 0, ties sharing the mean of their ranks. */
export function ranksOf(values: ArrayLike<number>): Float64Array {
  const order = Array.from({ length: values.length }, (_, k) => k).sort((a, b) => values[a] - values[b]);
  const ranks = new Float64Array(values.length);
  for (let from = 0; from < order.length;) {
    let until = from + 1;
    while (until < order.length && values[order[until]] === values[order[from]]) until += 1;
    for (let k = from; k < until; k += 1) ranks[order[k]] = (from + until - 1) / 2;
    from = until;
  }
  return ranks;
}

/** Pearson's correlation of two series of equal length; over ranks it is Spearman's. 0 where either does not vary. */
export function correlationOf(a: ArrayLike<number>, b: ArrayLike<number>): number {
  const n = a.length;
  let sumA = 0;
  let sumB = 0;
  for (let k = 0; k < n; k += 1) {
    sumA += a[k];
    sumB += b[k];
  }
  let both = 0;
  let squaresA = 0;
  let squaresB = 0;
  for (let k = 0; k < n; k += 1) {
    const da = a[k] - sumA / n;
    const db = b[k] - sumB / n;
    both += da * db;
    squaresA += da * da;
    squaresB += db * db;
  }
  return squaresA > 0 && squaresB > 0 ? both / Math.sqrt(squaresA * squaresB) : 0;
}
