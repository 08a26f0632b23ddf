import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { type CraftView, endpoints, Name } from '@common/contract';
import { Api } from '../api';
import { keeps } from '../ui/field-errors';
import { FormSave } from '../ui/form-save';
import { Notice } from '../ui/notice';
import { TextField } from '../ui/text-field';
import { Toasts } from '../ui/toasts';
import { CrewStore } from './crew-store';

/** The studio's crafts; one may be added, and one that nobody and nothing uses taken out. */
@Component({
  selector: 'fettle-crafts-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, Notice, TextField],
  template: `
    <section class="board stack" aria-labelledby="crafts-heading">
      <div class="row-ends">
        <h2 id="crafts-heading">Crafts</h2>
        @if (canEdit() && !isAdding()) {
          <button matButton type="button" (click)="isAdding.set(true)">Add a craft</button>
        }
      </div>
      @if (isAdding()) {
        <form class="stack" novalidate (submit)="add($event)">
          <fettle-text-field label="Name" [control]="form.controls.name" />
          @for (sentence of save.messages(); track sentence) {
            <fettle-notice tone="fault" [text]="sentence" />
          }
          <div class="row">
            <button matButton="filled" type="submit" [disabled]="save.busy()">Add it</button>
            <button matButton type="button" (click)="isAdding.set(false)">Don’t</button>
          </div>
        </form>
      }
      <ul class="plain-list">
        @for (craft of store.crafts.value() ?? []; track craft.id) {
          <li class="row-ends">
            <span
              >{{ craft.name }} <span class="quiet small">{{ holders(craft) }}</span></span
            >
            @if (canEdit() && holders(craft) === 'nobody yet') {
              <button matButton type="button" [attr.aria-label]="'Remove ' + craft.name" (click)="remove(craft)">
                Remove
              </button>
            }
          </li>
        }
      </ul>
    </section>
  `,
  styles: `
    li {
      padding-block: 2px;
      min-height: 2rem;
    }
  `,
})
export class CraftsBoard {
  private readonly api = inject(Api);
  private readonly toasts = inject(Toasts);

  readonly canEdit = input(false);

  protected readonly store = inject(CrewStore);
  protected readonly isAdding = signal(false);
  protected readonly save = new FormSave();
  protected readonly form = inject(NonNullableFormBuilder).group({ name: ['', [Validators.required, keeps(Name)]] });

  protected holders(craft: CraftView): string {
    const count = this.store.active().filter((maker) => maker.crafts.some((held) => held.craftId === craft.id)).length;
    return count === 0 ? 'nobody yet' : count === 1 ? '1 maker' : `${count} makers`;
  }

  protected async add(event: Event): Promise<void> {
    event.preventDefault();
    const { name } = this.form.getRawValue();
    const added = await this.save.run(
      this.form,
      () => this.api.callEndpoint(endpoints.createCraft, { body: { name, key: keyOf(name) } }),
      () => ['name'],
    );
    if (added) {
      this.form.reset();
      this.isAdding.set(false);
      this.store.crafts.reload();
    }
  }

  protected async remove(craft: CraftView): Promise<void> {
    try {
      await this.api.callEndpoint(endpoints.removeCraft, { params: { id: craft.id } });
    } catch (error) {
      this.toasts.fail(error);
    }
    this.store.crafts.reload();
  }
}

/** A craft's key from its name: "Filling & sanding" is `filling-sanding`. */
export function keyOf(name: string): string {
  const plain = name
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-');
  return plain.replace(/^[^a-z]+|-+$/g, '').slice(0, 40) || 'craft';
}
