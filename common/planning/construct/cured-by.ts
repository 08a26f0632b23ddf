import { type Compiled, ROOM } from './compiled';
import { type CuringCurve, endAtReference } from './curing-curve';

/** The first minute by which a stage's dwell has gained an age (thousandths of a reference minute) after `end`, where it is housed. */
export function curedBy(
  compiled: Compiled,
  stage: number,
  housing: Int32Array | null,
  end: number,
  age: number,
): number {
  const curve = curveOf(compiled, stage, housing);
  return curve ? curve.endOf(end, age) : endAtReference(end, age);
}

/** The fewest minutes that a stage's dwell can take where it is housed, whenever it begins. */
export function leastDwell(compiled: Compiled, stage: number, housing: Int32Array | null): number {
  const age = compiled.work.dwellAge[stage];
  if (age <= 0) return 0;
  const curve = curveOf(compiled, stage, housing);
  return curve ? curve.leastMinutes(age) : Math.ceil(age / 1000);
}

function curveOf(compiled: Compiled, stage: number, housing: Int32Array | null): CuringCurve | undefined {
  const curves = compiled.work.curves[stage];
  if (!curves) return undefined;
  const kept = compiled.work.keptPlace[stage];
  return curves.get(kept >= 0 && housing && kept < housing.length ? housing[kept] : ROOM);
}
