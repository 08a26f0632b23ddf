import type { z } from 'zod';
import type { FieldFault, StageDraft } from '@common/contract';
import { stageFaults } from '@common/domain/stage-rules';
import type { DraftRow } from '@database/draft-row';

type Draft = z.output<typeof StageDraft>;
/** The draft that a row's columns say. */
export function draftOf(row: DraftRow): Omit<Draft, 'crew' | 'places'> {
  const { lowMinutes, likelyMinutes, highMinutes } = row;
  return {
    name: row.name,
    kind: row.kind,
    handsOn: { lowMinutes, likelyMinutes, highMinutes },
    crewLossPermille: row.crewLossPermille,
    continuity: row.continuity,
    dwell:
      row.dwellMinutes === null
        ? null
        : {
            materialId: row.dwellMaterialId,
            milestone: row.dwellMilestone,
            minutes: row.dwellMinutes,
            attendedMinutes: row.dwellAttendedMinutes ?? 0,
            window: row.dwellWindow,
          },
    cautions: row.cautions,
    note: row.note,
    visitAt: row.visitAt?.toISOString() ?? null,
    replyMinutes: row.replyMinutes,
  };
}

/** The records that a draft may refer to. */
export interface KnownRecords {
  readonly craftIds: ReadonlySet<string>;
  readonly bayIds: ReadonlySet<string>;
  readonly materialIds: ReadonlySet<string>;
}

/** Everything wrong with a draft beyond the shape of its fields: the trade's own rules, and references to nothing. */
export function draftFaults(draft: Draft, known: KnownRecords, pointer = ''): FieldFault[] {
  const faults: FieldFault[] = stageFaults(draft).map((fault) => ({
    pointer: `${pointer}${fault.pointer}`,
    detail: fault.sentence,
  }));
  draft.crew.forEach(({ craftId }, i) => {
    if (!known.craftIds.has(craftId)) {
      faults.push({ pointer: `${pointer}/crew/${String(i)}/craftId`, detail: 'There is no such craft.' });
    }
  });
  draft.places.forEach(({ bayIds }, i) =>
    bayIds.forEach((bayId, j) => {
      if (!known.bayIds.has(bayId)) {
        const at = `${pointer}/places/${String(i)}/bayIds/${String(j)}`;
        faults.push({ pointer: at, detail: 'There is no such bay.' });
      }
    }),
  );
  const materialId = draft.dwell?.materialId ?? null;
  if (materialId !== null && !known.materialIds.has(materialId)) {
    faults.push({ pointer: `${pointer}/dwell/materialId`, detail: 'There is no such material.' });
  }
  return faults;
}
