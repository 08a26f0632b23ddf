import { computed, effect, inject, Injectable, untracked } from '@angular/core';
import { endpoints } from '@common/contract';
import { readEndpoint } from '../api';
import { PlanStore } from './plan-store';

/** The forecast of the plan on the wall: asked for once the plan is there, and again whenever it has changed. */
@Injectable()
export class ForecastStore {
  private readonly plan = inject(PlanStore);
  private readonly read = readEndpoint(endpoints.readForecast, () => (this.plan.view() ? {} : undefined));

  /** Fans by production: instants that rise, the least finish of all draws first. Empty until there is a forecast. */
  readonly fans = computed(
    () => new Map(this.read.value()?.productions.map(({ productionId, fan }) => [productionId, fan])),
  );
  /** Whether the forecast is of the plan on the wall, or of the one before. */
  readonly fresh = computed(() => this.read.value()?.revision === this.plan.view()?.revision);

  constructor() {
    effect(() => {
      const revision = this.plan.view()?.revision;
      const known = untracked(() => this.read.value()?.revision);
      if (revision !== undefined && known !== undefined && known !== revision) untracked(() => this.read.reload());
    });
  }
}
