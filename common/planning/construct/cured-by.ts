import { type Compiled, ROOM } from './compiled';
import { endAtReference } from './curing-curve';

/** The first minute by which a stage's dwell has gained an age (thousandths of a reference minute) after `end`, where it is housed. */
export function curedBy(
  compiled: Compiled,
  stage: number,
  housing: Int32Array | null,
  end: number,
  age: number,
): number {
  const curves = compiled.work.curves[stage];
  if (!curves) return endAtReference(end, age);
  const kept = compiled.work.keptPlace[stage];
  const curve = curves.get(kept >= 0 && housing && kept < housing.length ? housing[kept] : ROOM);
  return curve ? curve.endOf(end, age) : endAtReference(end, age);
}
