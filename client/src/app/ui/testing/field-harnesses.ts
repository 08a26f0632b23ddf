import { type BaseHarnessFilters, ComponentHarness, HarnessPredicate } from '@angular/cdk/testing';
import { MatErrorHarness } from '@angular/material/form-field/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatSelectHarness } from '@angular/material/select/testing';

/** Which field: by its label. */
export interface FieldFilters extends BaseHarnessFilters {
  readonly label?: string;
}

abstract class FieldHarness extends ComponentHarness {
  private readonly error = this.locatorForOptional(MatErrorHarness);
  private readonly labelText = this.locatorFor('mat-label');

  async label(): Promise<string> {
    return (await this.labelText()).text();
  }

  /** What it says is wrong; null where nothing is said. */
  async fault(): Promise<string | null> {
    return (await (await this.error())?.getText()) ?? null;
  }
}

abstract class WrittenFieldHarness extends FieldHarness {
  private readonly input = this.locatorFor(MatInputHarness);

  /** Writes over what stands there and leaves the field. */
  async write(text: string): Promise<void> {
    const input = await this.input();
    await input.setValue(text);
    await input.blur();
  }

  async value(): Promise<string> {
    return (await this.input()).getValue();
  }
}

/** Drives a text field. */
export class TextFieldHarness extends WrittenFieldHarness {
  static readonly hostSelector = 'fettle-text-field';

  static with(filters: FieldFilters = {}): HarnessPredicate<TextFieldHarness> {
    return new HarnessPredicate(TextFieldHarness, filters).addOption('label', filters.label, (field, label) =>
      HarnessPredicate.stringMatches(field.label(), label),
    );
  }
}

/** Drives a figure field. */
export class FigureFieldHarness extends WrittenFieldHarness {
  static readonly hostSelector = 'fettle-figure-field';

  static with(filters: FieldFilters = {}): HarnessPredicate<FigureFieldHarness> {
    return new HarnessPredicate(FigureFieldHarness, filters).addOption('label', filters.label, (field, label) =>
      HarnessPredicate.stringMatches(field.label(), label),
    );
  }
}

/** Drives a note field. */
export class NoteFieldHarness extends WrittenFieldHarness {
  static readonly hostSelector = 'fettle-note-field';
}

/** Drives a choice field, of one or of several. */
export class ChoiceFieldHarness extends FieldHarness {
  static readonly hostSelector = 'fettle-choice-field, fettle-choices-field';

  private readonly select = this.locatorFor(MatSelectHarness);

  static with(filters: FieldFilters = {}): HarnessPredicate<ChoiceFieldHarness> {
    return new HarnessPredicate(ChoiceFieldHarness, filters).addOption('label', filters.label, (field, label) =>
      HarnessPredicate.stringMatches(field.label(), label),
    );
  }

  /** Opens the list and picks what it is called. */
  async choose(label: string): Promise<void> {
    const select = await this.select();
    await select.open();
    await select.clickOptions({ text: label });
  }

  async chosen(): Promise<string> {
    return (await this.select()).getValueText();
  }
}
