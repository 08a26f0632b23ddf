import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { StageView } from '@common/contract';
import { Moment } from '../../ui/moment';
import { HoursPipe } from '../../ui/time-pipes';
import { ProductionStore } from '../production-store';
import { STAGE_KIND_WORDS, STAGE_STATE_WORDS, stageTitle } from '../words';
import { sayCrew, sayDwell, sayHandsOn, sayLink, sayPlaces } from './say-stage';

/** One stage of a piece: what it takes, where, what it waits for, and how far it is. */
@Component({
  selector: 'fettle-stage-line',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [HoursPipe, MatButton, Moment],
  template: `
    <div class="what">
      <h3>{{ title() }}</h3>
      @if (stage().kind !== 'make') {
        <p class="small kind">{{ kindWords() }}</p>
      }
      @if (links().length > 0) {
        <p class="small quiet">{{ links().join('; ') }}</p>
      }
      @if (stage().cautions.length > 0) {
        <p class="small caution">
          {{ stage().cautions.length }} {{ stage().cautions.length === 1 ? 'caution' : 'cautions' }}
        </p>
      }
    </div>
    <div class="small">
      @if (crew()) {
        <p>{{ crew() }}</p>
      }
      @if (handsOn()) {
        <p class="figures">{{ handsOn() }}</p>
      }
      @if (stage().kind === 'sign-off' && stage().visitAt; as visit) {
        <p>Visit <fettle-moment [at]="visit" /></p>
      }
    </div>
    <div class="small">
      @if (places()) {
        <p>{{ places() }}</p>
      }
      @if (dwell()) {
        <p class="dwell figures">{{ dwell() }}</p>
      }
    </div>
    <div class="state small">
      <p [attr.data-state]="stage().state">{{ stateWords() }}</p>
      @if (stage().spentMinutes > 0) {
        <p class="quiet figures">{{ stage().spentMinutes | hours }} spent</p>
      }
      @if (canEdit()) {
        <button matButton type="button" [attr.aria-label]="'Change ' + title()" (click)="opened.emit()">Change</button>
      }
    </div>
  `,
  styles: `
    :host {
      display: grid;
      grid-template-columns: minmax(0, 5fr) minmax(0, 4fr) minmax(0, 5fr) minmax(5.5rem, auto);
      gap: var(--space-1) var(--space-4);
      padding-block: var(--space-3);
      align-items: start;
    }
    h3 {
      font-size: 0.9375rem;
      font-weight: 500;
      overflow-wrap: anywhere;
    }
    .kind {
      font-weight: 600;
      color: var(--silicone);
    }
    .caution {
      color: var(--resin-ink);
      font-weight: 600;
    }
    .state {
      justify-items: end;
      text-align: end;
    }
    [data-state='finished'] {
      color: var(--verdigris);
      font-weight: 600;
    }
    [data-state='started'],
    [data-state='paused'] {
      font-weight: 600;
    }
    @media (max-width: 48rem) {
      :host {
        grid-template-columns: minmax(0, 1fr) auto;
      }
      .state {
        grid-area: 1 / 2 / span 3;
      }
    }
  `,
})
export class StageLine {
  private readonly names = inject(ProductionStore);

  readonly stage = input.required<StageView>();
  readonly canEdit = input(false);
  readonly opened = output();

  protected readonly title = computed(() => stageTitle(this.stage()));
  protected readonly kindWords = computed(() => STAGE_KIND_WORDS[this.stage().kind]);
  protected readonly stateWords = computed(() => STAGE_STATE_WORDS[this.stage().state]);
  protected readonly crew = computed(() => sayCrew(this.stage(), this.names));
  protected readonly handsOn = computed(() => sayHandsOn(this.stage()));
  protected readonly dwell = computed(() => sayDwell(this.stage(), this.names));
  protected readonly places = computed(() => sayPlaces(this.stage(), this.names));
  protected readonly links = computed(() =>
    this.names.linksInto(this.stage().id).map((link) => sayLink(link, this.stage().pieceId, this.names)),
  );
}
