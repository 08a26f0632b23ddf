import type { StageDraft } from '@common/domain/stage-draft';
import type { DraftColumns } from './entities';

/** The columns that a stage's draft fills. */
export type DraftRow = Omit<DraftColumns, 'dwellMaterial'>;

/** The columns of a draft; its crew and places are rows of their own. */
export function draftRow(
  draft: Omit<StageDraft, 'crew' | 'places'> & Partial<Pick<StageDraft, 'crew' | 'places'>>,
): DraftRow {
  const { dwell, handsOn } = draft;
  return {
    name: draft.name,
    kind: draft.kind,
    lowMinutes: handsOn.lowMinutes,
    likelyMinutes: handsOn.likelyMinutes,
    highMinutes: handsOn.highMinutes,
    crewLossPermille: draft.crewLossPermille,
    continuity: draft.continuity,
    dwellMinutes: dwell?.minutes ?? null,
    dwellAttendedMinutes: dwell?.attendedMinutes ?? null,
    dwellMaterialId: dwell?.materialId ?? null,
    dwellMilestone: dwell?.milestone ?? null,
    dwellWindow: dwell?.window ?? null,
    cautions: [...draft.cautions],
    note: draft.note,
    visitAt: draft.visitAt === null ? null : new Date(draft.visitAt),
    replyMinutes: draft.replyMinutes,
  };
}
