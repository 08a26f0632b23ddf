import { exactly, type LogFactor, type ThreePoint, type Uncertainty } from '../forecast';
import { MINUTES_PER_DAY } from '../time/zone';
import type { SnapshotMaterial, SnapshotPurchase, SnapshotStage, StudioSnapshot } from './studio-snapshot';

/** What is believed of anything that nobody has given three points for, per mille of what was planned. */
export interface UsualSpreads {
  /** A dwell without a material, at its shortest and longest. */
  readonly dwellLowPermille: number;
  readonly dwellHighPermille: number;
  /** A client's answer, at its soonest and latest. */
  readonly replyLowPermille: number;
  readonly replyHighPermille: number;
  /** How late a delivery comes at the worst, of its lead time. */
  readonly deliveryLatePermille: number;
  /** Chance that a maker is away on a day that they should be there. */
  readonly absencePermille: number;
  /** How much a warm or cold week moves all dwells at once: standard deviation of the logarithm. */
  readonly climateSpreadPermille: number;
}

/** What a studio begins with. Common practice, no source. */
export const USUAL_SPREADS: UsualSpreads = {
  dwellLowPermille: 850,
  dwellHighPermille: 1500,
  replyLowPermille: 500,
  replyHighPermille: 3000,
  deliveryLatePermille: 300,
  absencePermille: 20,
  climateSpreadPermille: 60,
};

/**
 * What is not known about the studio's times, for the forecast: hours by their three points, dwells by their material's,
 * answers, deliveries and absence by what is usual. `overrun` is what the studio's finished work has taught (`learnOverrun`).
 */
export function buildUncertainty(snapshot: StudioSnapshot, spreads: UsualSpreads, overrun: LogFactor): Uncertainty {
  const materials = new Map(snapshot.materials.map((material) => [material.id, material]));
  const purchases = new Map<string, SnapshotPurchase[]>();
  for (const purchase of snapshot.purchases) {
    purchases.set(purchase.stageId, [...(purchases.get(purchase.stageId) ?? []), purchase]);
  }
  return {
    stages: snapshot.stages.map((stage) => ({
      stageId: stage.id,
      effortMinutes: effortSpread(stage, spreads),
      dwellMinutes: stage.dwell && dwellSpread(stage.dwell, materials, spreads),
      delayMinutes: deliverySpread(purchases.get(stage.id) ?? [], spreads),
    })),
    overrun,
    curing: { meanLog: 0, sdLog: spreads.climateSpreadPermille / 1000 },
    absence: snapshot.makers.map(({ id }) => ({ makerId: id, perDay: spreads.absencePermille / 1000 })),
  };
}

function effortSpread({ kind, visitAt, replyMinutes, handsOn }: SnapshotStage, spreads: UsualSpreads): ThreePoint {
  if (kind === 'sign-off' && visitAt === null && replyMinutes > 0) {
    return scaled(replyMinutes, spreads.replyLowPermille, spreads.replyHighPermille);
  }
  return { low: handsOn.lowMinutes, likely: handsOn.likelyMinutes, high: handsOn.highMinutes };
}

/** The material's own spread about what the stage was planned with, which may differ from the library's likeliest by now. */
function dwellSpread(
  { materialId, milestone, minutes }: NonNullable<SnapshotStage['dwell']>,
  materials: ReadonlyMap<string, SnapshotMaterial>,
  spreads: UsualSpreads,
): ThreePoint {
  const known = materials.get(materialId ?? '')?.milestones.find((one) => one.milestone === milestone)?.minutes;
  if (!known || known.likely <= 0) return scaled(minutes, spreads.dwellLowPermille, spreads.dwellHighPermille);
  return { low: (minutes * known.low) / known.likely, likely: minutes, high: (minutes * known.high) / known.likely };
}

function deliverySpread(purchases: readonly SnapshotPurchase[], spreads: UsualSpreads): ThreePoint {
  const awaited = purchases.filter((purchase) => purchase.receivedOn === null);
  const longestLead = awaited.reduce((days, purchase) => Math.max(days, purchase.leadDays), 0);
  if (longestLead === 0) return exactly(0);
  return { low: 0, likely: 0, high: (longestLead * MINUTES_PER_DAY * spreads.deliveryLatePermille) / 1000 };
}

function scaled(minutes: number, lowPermille: number, highPermille: number): ThreePoint {
  return { low: (lowPermille * minutes) / 1000, likely: minutes, high: (highPermille * minutes) / 1000 };
}
