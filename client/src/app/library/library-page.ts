import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { endpoints } from '@common/contract';
import { CAUTION_NOTICE } from '@common/domain/safety';
import { readEndpoint, reloadOnChange } from '../api';
import { SessionStore } from '../session';
import { Notice } from '../ui/notice';
import { PageHeading } from '../ui/page-heading';
import { StatePanel } from '../ui/state-panel';
import { ClockTimePipe } from '../ui/time-pipes';
import { sayMilestone } from './words';

/** What the studio knows: materials with their dwells, and recipes. */
@Component({
  selector: 'fettle-library-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ClockTimePipe, MatButton, Notice, PageHeading, RouterLink, StatePanel],
  templateUrl: './library-page.html',
  styleUrl: './library-page.scss',
})
export class LibraryPage {
  protected readonly isOffice = inject(SessionStore).isOffice();
  protected readonly materials = readEndpoint(endpoints.listMaterials);
  protected readonly recipes = readEndpoint(endpoints.listRecipes);
  protected readonly notice = CAUTION_NOTICE;
  protected readonly sayMilestone = sayMilestone;
  protected readonly sought = signal('');

  protected readonly families = computed(() => {
    const sought = this.sought().trim().toLowerCase();
    const found = (this.materials.value() ?? [])
      .filter((one) => `${one.name} ${one.family}`.toLowerCase().includes(sought))
      .toSorted((a, b) => a.family.localeCompare(b.family) || a.name.localeCompare(b.name));
    const names = [...new Set(found.map((one) => one.family))];
    return names.map((family) => ({ family, materials: found.filter((one) => one.family === family) }));
  });

  constructor() {
    reloadOnChange(this.materials, 'material');
    reloadOnChange(this.recipes, 'recipe');
  }
}
