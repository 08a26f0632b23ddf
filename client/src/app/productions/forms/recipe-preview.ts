import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { expandRecipe } from '@common/domain/expand-recipe';
import type { RecipeAmounts, RecipeDraft } from '@common/domain/recipe';
import { HoursPipe } from '../../ui/time-pipes';
import { sayCrew, sayDwell, sayHandsOn, type StageNames } from '../parts/say-stage';
import { stageTitle } from '../words';

/** The stages that a recipe comes to in chosen amounts, before anything is saved. */
@Component({
  selector: 'fettle-recipe-preview',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [HoursPipe],
  template: `
    <section aria-labelledby="preview-heading">
      <h3 id="preview-heading">
        {{ lines().length }} {{ lines().length === 1 ? 'stage' : 'stages' }}, {{ totalMinutes() | hours }} hands-on
        @if (expanded().moulds > 0) {
          , {{ expanded().moulds }} {{ expanded().moulds === 1 ? 'mould' : 'moulds' }}
        }
      </h3>
      <ol class="small" tabindex="0" aria-label="Stages of this piece">
        @for (line of lines(); track $index) {
          <li>
            <span class="name">{{ line.title }}</span>
            <span class="quiet figures">{{ line.detail }}</span>
          </li>
        }
      </ol>
    </section>
  `,
  styles: `
    section {
      display: grid;
      gap: var(--space-2);
    }
    ol {
      margin: 0;
      max-height: 16rem;
      overflow-y: auto;
      border: 1px solid var(--rule);
      border-radius: var(--corner);
      padding: var(--space-2) var(--space-3) var(--space-2) 2.5rem;
    }
    li {
      padding-block: 2px;
    }
    .name {
      font-weight: 500;
    }
    .name::after {
      content: ' ';
    }
  `,
})
export class RecipePreview {
  readonly recipe = input.required<RecipeDraft>();
  /** Amounts that the recipe can be made in; see `recipeAmountsFault`. */
  readonly amounts = input.required<RecipeAmounts>();
  readonly names = input.required<StageNames>();

  protected readonly expanded = computed(() => expandRecipe(this.recipe(), this.amounts()));
  protected readonly lines = computed(() =>
    this.expanded().stages.map((stage) => {
      const draft = { ...stage.draft, crew: [...stage.draft.crew] };
      const parts = [sayCrew(draft, this.names()), sayHandsOn(draft), sayDwell(draft, this.names())];
      return {
        title: stageTitle({ name: draft.name, nth: stage.nth, of: stage.of }),
        detail: parts.filter(Boolean).join(' · '),
      };
    }),
  );
  protected readonly totalMinutes = computed(() =>
    this.expanded().stages.reduce((sum, stage) => sum + stage.draft.handsOn.likelyMinutes, 0),
  );
}
