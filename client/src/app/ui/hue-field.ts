import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl, ReactiveFormsModule } from '@angular/forms';
import { PRODUCTION_HUES } from '@common/domain/production-hue';
import { hueColour } from './production-hues';

/** A production's hue, chosen from the set by name as much as by sight. */
@Component({
  selector: 'fettle-hue-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ReactiveFormsModule],
  template: `
    <fieldset>
      <legend class="label">Hue</legend>
      <div class="hues">
        @for (hue of hues; track hue.name; let index = $index) {
          <label [attr.title]="hue.name">
            <input type="radio" name="hue" [value]="index" [formControl]="control()" />
            <span class="visually-hidden">{{ hue.name }}{{ taken().includes(index) ? ', in use' : '' }}</span>
            <span class="swatch" aria-hidden="true" [style.background]="fill(index)" [style.color]="on(index)">{{
              taken().includes(index) ? '·' : ''
            }}</span>
          </label>
        }
      </div>
      <p class="small quiet">A dot stands on hues that another production has.</p>
    </fieldset>
  `,
  styles: `
    fieldset {
      border: 0;
      margin: 0;
      padding: 0;
    }
    .hues {
      display: flex;
      flex-wrap: wrap;
      gap: var(--space-2);
      margin-block: var(--space-1);
    }
    label {
      position: relative;
      cursor: pointer;
    }
    input {
      position: absolute;
      inset: 0;
      width: 100%;
      height: 100%;
      margin: 0;
      opacity: 0;
      cursor: pointer;
    }
    .swatch {
      display: grid;
      place-items: center;
      width: 2.25rem;
      height: 2.25rem;
      border-radius: var(--corner);
      font-weight: 700;
      font-size: 1.5rem;
      line-height: 0;
    }
    input:checked ~ .swatch {
      outline: 3px solid var(--ink);
      outline-offset: 2px;
    }
    input:focus-visible ~ .swatch {
      outline: 3px solid var(--silicone);
      outline-offset: 2px;
    }
  `,
})
export class HueField {
  readonly control = input.required<FormControl<number>>();
  /** Hues that other productions have. */
  readonly taken = input<readonly number[]>([]);

  protected readonly hues = PRODUCTION_HUES;
  protected readonly fill = (index: number): string => hueColour(index);
  protected readonly on = (index: number): string => hueColour(index, 'on');
}
