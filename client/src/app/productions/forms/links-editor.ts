import { ChangeDetectionStrategy, Component, computed, inject, input, linkedSignal, signal } from '@angular/core';
import { FormControl, NonNullableFormBuilder, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { endpoints, type ProductionView, type StageLink, type StageView } from '@common/contract';
import { Api, toApiFailure } from '../../api';
import { ChoiceField, type Choice, choicesOf } from '../../ui/choice-field';
import { FigureField } from '../../ui/figure-field';
import { FormSave } from '../../ui/form-save';
import { Notice } from '../../ui/notice';
import { CLOCK_TIME } from '../../ui/reads-text';
import { sayLink, type StageNames } from '../parts/say-stage';
import { LINK_WORDS } from '../words';

const AFTER_WORDS = { dwell: 'its dwell too', work: 'its work alone' };
const TIME_WORDS = { clock: 'By the clock', working: 'In working time' };

/** The links by which a stage waits for others; each is saved by itself, at once. */
@Component({
  selector: 'fettle-links-editor',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, FigureField, MatButton, Notice],
  template: `
    <ul class="plain-list">
      @for (link of links(); track link.id) {
        <li>
          <span>{{ say(link) }}</span>
          <button matButton type="button" [attr.aria-label]="'Remove: ' + say(link)" (click)="remove(link)">
            Remove
          </button>
        </li>
      } @empty {
        <li class="quiet">Nothing: it may begin as soon as people and places are free.</li>
      }
    </ul>
    @if (isAdding()) {
      <div class="fields">
        <fettle-choice-field label="Stage" [control]="form.controls.fromStageId" [choices]="choices()" />
        <fettle-choice-field label="This one" [control]="form.controls.kind" [choices]="kinds" />
        <fettle-choice-field label="Counting" [control]="form.controls.after" [choices]="afters" />
        <fettle-figure-field label="At least" [reader]="clock" [control]="form.controls.minGapMinutes" />
        <fettle-figure-field
          label="At most"
          hint="Empty for no limit."
          [reader]="clock"
          [control]="form.controls.maxGapMinutes"
        />
        <fettle-choice-field label="Time counted" [control]="form.controls.time" [choices]="times" />
      </div>
      <div class="row">
        <button matButton="outlined" type="button" [disabled]="save.busy()" (click)="add()">Add this link</button>
        <button matButton type="button" (click)="isAdding.set(false)">Don’t</button>
      </div>
    } @else {
      <button matButton="outlined" type="button" (click)="isAdding.set(true)">Let it wait for a stage</button>
    }
    @for (sentence of messages(); track sentence) {
      <fettle-notice tone="fault" [text]="sentence" />
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: var(--space-2);
      justify-items: start;
    }
    ul,
    .fields,
    fettle-notice {
      width: 100%;
    }
    li {
      display: flex;
      gap: var(--space-3);
      justify-content: space-between;
      align-items: center;
    }
  `,
})
export class LinksEditor {
  private readonly api = inject(Api);

  readonly production = input.required<ProductionView>();
  readonly stage = input.required<StageView>();
  readonly names = input.required<StageNames>();
  readonly choices = input.required<readonly Choice<string>[]>();

  protected readonly clock = CLOCK_TIME;
  protected readonly kinds = choicesOf(LINK_WORDS);
  protected readonly afters = choicesOf(AFTER_WORDS);
  protected readonly times = choicesOf(TIME_WORDS);
  protected readonly isAdding = signal(false);
  protected readonly save = new FormSave();
  private readonly removing = signal<string | null>(null);
  protected readonly messages = computed(() => {
    const failed = this.removing();
    return failed === null ? this.save.messages() : [failed];
  });
  protected readonly links = linkedSignal(() =>
    this.production().links.filter((link) => link.toStageId === this.stage().id),
  );

  protected readonly form = inject(NonNullableFormBuilder).group({
    fromStageId: ['', Validators.required],
    kind: new FormControl<StageLink['kind']>('finish-start', { nonNullable: true }),
    after: new FormControl<StageLink['after']>('dwell', { nonNullable: true }),
    minGapMinutes: new FormControl<number | null>(0, Validators.required),
    maxGapMinutes: new FormControl<number | null>(null),
    time: new FormControl<StageLink['time']>('clock', { nonNullable: true }),
  });

  protected say(link: StageLink): string {
    return sayLink(link, this.stage().pieceId, this.names());
  }

  protected async add(): Promise<void> {
    this.removing.set(null);
    const raw = this.form.getRawValue();
    const body = { ...raw, toStageId: this.stage().id, minGapMinutes: raw.minGapMinutes ?? 0 };
    const link = await this.save.run(this.form, () => this.api.callEndpoint(endpoints.createLink, { body }));
    if (link) {
      this.links.update((links) => [...links, link]);
      this.form.reset();
      this.isAdding.set(false);
    }
  }

  protected async remove(link: StageLink): Promise<void> {
    this.removing.set(null);
    try {
      await this.api.callEndpoint(endpoints.removeLink, { params: { id: link.id } });
      this.links.update((links) => links.filter((one) => one.id !== link.id));
    } catch (error) {
      this.removing.set(toApiFailure(error).detail);
    }
  }
}
