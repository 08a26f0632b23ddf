import { exactly, type LogFactor, type StageUncertainty, type ThreePoint, type Uncertainty } from '../forecast';
import { MINUTES_PER_DAY } from '../time/zone';
import type { SnapshotMaterial, SnapshotPurchase, SnapshotStage, StudioSnapshot } from './studio-snapshot';

/** What is believed of anything that nobody has given three points for. Common practice, no source. */
export const USUAL_SPREADS = {
  /** A dwell without a material: per mille of what was planned. */
  dwellPermille: { low: 850, likely: 1000, high: 1500 },
  /** A client's answer: per mille of the usual time to one. */
  replyPermille: { low: 500, likely: 1000, high: 3000 },
  /** A supplier: days late per day of lead time, in per mille, at the worst. */
  latestDeliveryPermille: 300,
  /** Chance that a maker is away on a day that they should be there. */
  absencePerDay: 0.02,
  /** How much a warm or cold week moves all dwells at once: standard deviation of the logarithm. */
  curing: { meanLog: 0, sdLog: 0.06 },
} as const;

/**
 * What is not known about the studio's times, for the forecast: hours by their three points, dwells by their material's,
 * answers, deliveries and absence by what is usual. `overrun` is what the studio's finished work has taught (`learnOverrun`).
 */
export function buildUncertainty(snapshot: StudioSnapshot, overrun: LogFactor): Uncertainty {
  const materials = new Map(snapshot.materials.map((material) => [material.id, material]));
  const purchasesFor = (stageId: string) => snapshot.purchases.filter((purchase) => purchase.stageId === stageId);
  return {
    stages: snapshot.stages.map((stage) => stageUncertainty(stage, materials, purchasesFor(stage.id))),
    overrun,
    curing: USUAL_SPREADS.curing,
    absence: snapshot.makers.map(({ id }) => ({ makerId: id, perDay: USUAL_SPREADS.absencePerDay })),
  };
}

function stageUncertainty(
  stage: SnapshotStage,
  materials: ReadonlyMap<string, SnapshotMaterial>,
  purchases: readonly SnapshotPurchase[],
): StageUncertainty {
  const { lowMinutes, likelyMinutes, highMinutes } = stage.handsOn;
  const isAnswer = stage.kind === 'sign-off' && stage.visitAt === null && stage.replyMinutes > 0;
  return {
    stageId: stage.id,
    effortMinutes: isAnswer
      ? scaled(USUAL_SPREADS.replyPermille, stage.replyMinutes)
      : { low: lowMinutes, likely: likelyMinutes, high: highMinutes },
    dwellMinutes: stage.dwell && dwellSpread(stage.dwell, materials),
    delayMinutes: deliverySpread(purchases),
  };
}

/** The material's own spread about what the stage was planned with, which may differ from the library's likeliest by now. */
function dwellSpread(
  { materialId, milestone, minutes }: NonNullable<SnapshotStage['dwell']>,
  materials: ReadonlyMap<string, SnapshotMaterial>,
): ThreePoint {
  const known = materials.get(materialId ?? '')?.milestones.find((one) => one.milestone === milestone)?.minutes;
  if (!known || known.likely <= 0) return scaled(USUAL_SPREADS.dwellPermille, minutes);
  return { low: (minutes * known.low) / known.likely, likely: minutes, high: (minutes * known.high) / known.likely };
}

function deliverySpread(purchases: readonly SnapshotPurchase[]): ThreePoint {
  const awaited = purchases.filter((purchase) => purchase.receivedOn === null);
  const longestLead = awaited.reduce((days, purchase) => Math.max(days, purchase.leadDays), 0);
  if (longestLead === 0) return exactly(0);
  const worst = (longestLead * MINUTES_PER_DAY * USUAL_SPREADS.latestDeliveryPermille) / 1000;
  return { low: 0, likely: 0, high: worst };
}

function scaled(permille: ThreePoint, minutes: number): ThreePoint {
  return { low: (permille.low * minutes) / 1000, likely: minutes, high: (permille.high * minutes) / 1000 };
}
