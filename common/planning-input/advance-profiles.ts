import type { SnapshotStage, StudioSnapshot } from './studio-snapshot';
import { advanceSteps, isSteady } from '../dwell/advance';
import type { ClimateHistory } from '../dwell/climate';
import type { DwellBehaviour } from '../dwell/law';
import type { AdvanceProfile } from '../planning/problem/dwell';

/** Key of `Dwell.advance` for a piece that keeps no bay while it dwells. */
const ROOM = 'room';

/** Gathers the advance profiles that the stages of one problem need, each course of rates once. */
export class AdvanceProfiles {
  private readonly behaviours: ReadonlyMap<string, DwellBehaviour>;
  private readonly climates: ReadonlyMap<string, ClimateHistory | null>;
  private readonly room: ClimateHistory;
  private readonly byCourse = new Map<string, AdvanceProfile>();

  constructor({ materials, bays, room }: StudioSnapshot) {
    this.behaviours = new Map(
      materials.flatMap(({ id, milestones }) =>
        milestones.map(({ milestone, behaviour }) => [milestoneKey(id, milestone), behaviour] as const),
      ),
    );
    this.climates = new Map(bays.map((bay) => [bay.id, bay.climate]));
    this.room = room;
  }

  /** Every profile asked for so far, in the order of first asking. */
  all(): readonly AdvanceProfile[] {
    return [...this.byCourse.values()];
  }

  /**
   * Which profile holds where for a stage's dwell: each bay that it may keep, or the room where it keeps none. Nothing is
   * said where the dwell keeps its stated pace, as one without a material does.
   */
  advanceOf(stage: SnapshotStage): Readonly<Record<string, string>> {
    const { materialId, milestone } = stage.dwell ?? {};
    const behaviour = materialId && milestone ? this.behaviours.get(milestoneKey(materialId, milestone)) : undefined;
    if (!behaviour) {
      return {};
    }
    const kept = stage.places.find((place) => place.hold !== 'work');
    const advance: Record<string, string> = {};
    for (const where of kept?.bayIds ?? [ROOM]) {
      const profileId = this.profileId(behaviour, this.climates.get(where) ?? this.room);
      if (profileId !== null) {
        advance[where] = profileId;
      }
    }
    return advance;
  }

  private profileId(behaviour: DwellBehaviour, climate: ClimateHistory): string | null {
    const steps = advanceSteps(behaviour, climate);
    if (isSteady(steps)) {
      return null;
    }
    const course = JSON.stringify(steps);
    const known = this.byCourse.get(course);
    if (known) {
      return known.id;
    }
    const profile = { id: `advance-${this.byCourse.size + 1}`, ...steps };
    this.byCourse.set(course, profile);
    return profile.id;
  }
}

function milestoneKey(materialId: string, milestone: string): string {
  return `${materialId} ${milestone}`;
}
