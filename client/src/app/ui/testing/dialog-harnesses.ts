import { type BaseHarnessFilters, ComponentHarness, HarnessPredicate } from '@angular/cdk/testing';
import { MatButtonHarness } from '@angular/material/button/testing';

abstract class AskingHarness extends ComponentHarness {
  async text(): Promise<string> {
    return (await this.host()).text();
  }

  /** Presses the button with that text. */
  async press(text: string): Promise<void> {
    await (await this.locatorFor(MatButtonHarness.with({ text }))()).click();
  }
}

/** Drives the question before something that is not easily taken back. */
export class ConfirmDialogHarness extends AskingHarness {
  static readonly hostSelector = 'fettle-confirm-dialog';
}

/** Drives the dialog that shows two people's values. */
export class ConflictDialogHarness extends AskingHarness {
  static readonly hostSelector = 'fettle-conflict-dialog';

  /** The rows as "field | theirs | mine". */
  async differences(): Promise<readonly string[]> {
    const rows = await this.locatorForAll('tbody tr')();
    return Promise.all(rows.map(async (row) => (await row.text()).replace(/\s+/g, ' ').trim()));
  }
}

/** Drives the frame of a form in a dialog. */
export class FormDialogHarness extends AskingHarness {
  static readonly hostSelector = 'fettle-form-dialog';

  private readonly notices = this.locatorForAll('[role="alert"]');

  static with(filters: BaseHarnessFilters = {}): HarnessPredicate<FormDialogHarness> {
    return new HarnessPredicate(FormDialogHarness, filters);
  }

  /** What it says went wrong as a whole. */
  async messages(): Promise<readonly string[]> {
    return Promise.all((await this.notices()).map((notice) => notice.text()));
  }
}
