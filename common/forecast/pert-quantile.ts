import { betaPertShapes, type ThreePoint } from './three-point';

/** Cells of the table; linear in between, which is true to about a thousandth of the estimate's width. */
const CELLS = 256;
const STEPS = 1024;
/** Leans that differ by less than this share a table. */
const LEAN_STEPS = 200;

const tables = new Map<number, Float64Array>();

/**
 * The value that an estimate stays below with probability `share` (0 to 1), by the beta distribution with the PERT mean. Tabled
 * once for each lean of likeliest between least and greatest, so that a thousand draws of two hundred stages cost no integrals.
 */
export function pertQuantile(estimate: ThreePoint, share: number): number {
  return pertQuantiles(estimate)(share);
}

/** The same for many shares of one estimate. */
export function pertQuantiles(estimate: ThreePoint): (share: number) => number {
  const { low, likely, high } = estimate;
  if (high <= low) return () => likely;
  const table = tableOf(estimate);
  return (share) => {
    const at = Math.min(CELLS - 1e-9, Math.max(0, share * CELLS));
    const cell = Math.floor(at);
    return low + (high - low) * (table[cell] + (at - cell) * (table[cell + 1] - table[cell]));
  };
}

function tableOf(estimate: ThreePoint): Float64Array {
  const lean = Math.round(((estimate.likely - estimate.low) / (estimate.high - estimate.low)) * LEAN_STEPS);
  let table = tables.get(lean);
  if (!table) {
    table = inverseTable(...betaPertShapes({ low: 0, likely: lean / LEAN_STEPS, high: 1 }));
    tables.set(lean, table);
  }
  return table;
}

/** The inverse of a beta distribution at equal steps, by the midpoint rule over its density; both shapes are 1 or more. */
function inverseTable(alpha: number, beta: number): Float64Array {
  const cumulative = new Float64Array(STEPS + 1);
  for (let k = 0; k < STEPS; k += 1) {
    const x = (k + 0.5) / STEPS;
    cumulative[k + 1] = cumulative[k] + x ** (alpha - 1) * (1 - x) ** (beta - 1);
  }
  const whole = cumulative[STEPS];
  const table = new Float64Array(CELLS + 1);
  for (let cell = 0, k = 0; cell <= CELLS; cell += 1) {
    const target = (whole * cell) / CELLS;
    while (k < STEPS - 1 && cumulative[k + 1] < target) k += 1;
    const density = cumulative[k + 1] - cumulative[k];
    table[cell] = Math.min(1, Math.max(0, (k + (density > 0 ? (target - cumulative[k]) / density : 0)) / STEPS));
  }
  return table;
}
