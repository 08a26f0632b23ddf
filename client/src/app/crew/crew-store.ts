import { computed, inject, Injectable } from '@angular/core';
import { endpoints, type LeaveView, type MakerView } from '@common/contract';
import { Api, readEndpoint, reloadOnChange } from '../api';
import type { Away } from '../ui/patterns';
import { Toasts } from '../ui/toasts';

/** The makers with what they can do and when they are away. Provided by the page that shows them. */
@Injectable()
export class CrewStore {
  private readonly api = inject(Api);
  private readonly toasts = inject(Toasts);

  readonly makers = readEndpoint(endpoints.listMakers);
  readonly crafts = readEndpoint(endpoints.listCrafts);
  readonly leave = readEndpoint(endpoints.listLeave);
  readonly closures = readEndpoint(endpoints.listClosures);

  /** Those who work here now, by name. */
  readonly active = computed(() => byName((this.makers.value() ?? []).filter((maker) => maker.active)));
  /** Those who no longer do. */
  readonly former = computed(() => byName((this.makers.value() ?? []).filter((maker) => !maker.active)));
  private readonly craftNames = computed(
    () => new Map((this.crafts.value() ?? []).map((craft) => [craft.id, craft.name])),
  );
  private readonly closed = computed<readonly Away[]>(() =>
    (this.closures.value() ?? []).map(({ days }) => ({ days, word: 'Closed' })),
  );

  constructor() {
    reloadOnChange(this.makers, 'maker');
    reloadOnChange(this.crafts, 'craft');
    reloadOnChange(this.leave, 'leave');
    reloadOnChange(this.closures, 'closure');
  }

  /** "Carving 1.2, Painting": a maker's crafts, with the pace where it is not the usual one. */
  sayCrafts(maker: Pick<MakerView, 'crafts'>): string {
    return maker.crafts
      .map(({ craftId, pacePermille }) => {
        const name = this.craftNames().get(craftId) ?? 'a craft';
        return pacePermille === 1000 ? name : `${name} ${pacePermille / 1000}`;
      })
      .join(', ');
  }

  /** When a maker is not there: leave and closures. */
  awayOf(makerId: string): readonly Away[] {
    const own = (this.leave.value() ?? []).filter((one) => one.makerId === makerId);
    return [...own.map(({ days }) => ({ days, word: 'Leave' })), ...this.closed()];
  }

  /** Takes a leave out again. */
  async removeLeave(leave: LeaveView): Promise<void> {
    try {
      await this.api.callEndpoint(endpoints.removeLeave, { params: { id: leave.id } });
    } catch (error) {
      this.toasts.fail(error);
    }
    this.leave.reload();
  }
}

function byName(makers: readonly MakerView[]): readonly MakerView[] {
  return makers.toSorted((a, b) => a.name.localeCompare(b.name));
}
