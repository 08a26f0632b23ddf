import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Title } from '@angular/platform-browser';
import { RouterLink } from '@angular/router';
import { endpoints, type RecipeStep } from '@common/contract';
import { MILESTONE_NAMES, type MaterialMilestone } from '@common/domain/material';
import { formatMinutes } from '@common/time/format-instant';
import { readEndpoint } from '../api';
import { SessionStore } from '../session';
import { Notice } from '../ui/notice';
import { PageHeading } from '../ui/page-heading';
import { sayHours } from '../ui/say-time';
import { StatePanel } from '../ui/state-panel';
import { RecipeForm } from './recipe-form';
import { EACH_WORDS } from './words';

/** One recipe: its steps in order, with what each takes for one unit of size. */
@Component({
  selector: 'fettle-recipe-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, Notice, PageHeading, RecipeForm, RouterLink, StatePanel],
  template: `
    <div class="page">
      <fettle-state-panel [read]="recipes">
        @if (recipe(); as shown) {
          <div class="whole">
            <fettle-page-heading [title]="shown.name" [lead]="shown.makes">
              <a above class="small" routerLink="/library">Library</a>
              @if (isOffice && !isChanging()) {
                <button matButton="outlined" type="button" (click)="isChanging.set(true)">Change</button>
              }
            </fettle-page-heading>
            @if (isChanging()) {
              <fettle-recipe-form [recipe]="shown" (done)="finish()" />
            } @else {
              <p class="figures">
                Usually {{ shown.usualSize }} {{ shown.sizeUnit }}, {{ shown.usualCasts }}
                {{ shown.usualCasts === 1 ? 'cast' : 'casts' }} from {{ shown.usualMoulds }}
                {{ shown.usualMoulds === 1 ? 'mould' : 'moulds' }}, {{ shown.usualCoats }}
                {{ shown.usualCoats === 1 ? 'coat' : 'coats' }}. Hours below are for one {{ shown.sizeUnit }}.
              </p>
              <ol class="board steps">
                @for (step of shown.steps; track $index) {
                  <li>
                    <h2>{{ step.stage.name }}</h2>
                    <p class="small figures">{{ take(step) }}</p>
                    <p class="small quiet">{{ order(step) }}</p>
                  </li>
                }
              </ol>
            }
          </div>
        } @else if (recipes.value()) {
          <fettle-notice tone="fault" text="This recipe is not there any more." />
        }
      </fettle-state-panel>
    </div>
  `,
  styles: `
    .whole {
      display: grid;
      gap: var(--space-4);
      grid-template-columns: minmax(0, 1fr);
    }
    .steps {
      margin: 0;
      padding-inline-start: 3rem;
    }
    .steps li {
      padding-block: var(--space-2);
    }
    .steps li::marker {
      font-weight: 600;
      color: var(--graphite);
    }
    h2 {
      font-size: 1rem;
    }
  `,
})
export class RecipePage {
  /** From the address. */
  readonly id = input.required<string>();

  protected readonly isOffice = inject(SessionStore).isOffice();
  protected readonly recipes = readEndpoint(endpoints.listRecipes);
  private readonly crafts = readEndpoint(endpoints.listCrafts);
  private readonly materials = readEndpoint(endpoints.listMaterials);
  protected readonly isChanging = signal(false);
  protected readonly recipe = computed(() => this.recipes.value()?.find((one) => one.id === this.id()) ?? null);

  constructor() {
    const title = inject(Title);
    effect(() => {
      const recipe = this.recipe();
      if (recipe) {
        title.setTitle(`${recipe.name} · Fettle`);
      }
    });
  }

  /** What a step takes: hours, crafts, dwell. */
  protected take({ stage }: RecipeStep): string {
    const { lowMinutes, likelyMinutes, highMinutes } = stage.handsOn;
    const crafts = stage.crew.map(({ craftId }) => this.crafts.value()?.find((one) => one.id === craftId)?.name ?? '');
    const hours =
      highMinutes === 0 ? '' : `${sayHours(likelyMinutes)} (${sayHours(lowMinutes)} – ${sayHours(highMinutes)})`;
    return [crafts.join(', '), hours, this.dwell(stage)].filter(Boolean).join(' · ');
  }

  /** When a step comes and how often. */
  protected order(step: RecipeStep): string {
    const steps = this.recipe()?.steps ?? [];
    const after = step.after.map((index) => steps[index]?.stage.name).filter(Boolean);
    return [
      EACH_WORDS[step.each],
      after.length > 0 && `after ${after.join(', ')}`,
      step.mould === 'makes' && 'makes the mould',
      step.mould === 'fills' && 'fills a mould',
      step.untilStep !== null && `keeps its place until ${steps[step.untilStep]?.stage.name} has ended`,
    ]
      .filter(Boolean)
      .join('; ');
  }

  protected finish(): void {
    this.isChanging.set(false);
    this.recipes.reload();
  }

  private dwell({ dwell }: RecipeStep['stage']): string {
    if (dwell === null) {
      return '';
    }
    const name = this.materials.value()?.find((one) => one.id === dwell.materialId)?.name;
    const until = dwell.milestone === null ? '' : ` until ${MILESTONE_NAMES[dwell.milestone as MaterialMilestone]}`;
    return `dwell ${formatMinutes(dwell.minutes)}${name ? ` (${name}${until})` : ''}`;
  }
}
