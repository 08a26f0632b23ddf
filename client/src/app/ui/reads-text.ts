import { Directive, ElementRef, forwardRef, inject, input } from '@angular/core';
import {
  type ControlValueAccessor,
  NG_VALIDATORS,
  NG_VALUE_ACCESSOR,
  type ValidationErrors,
  type Validator,
} from '@angular/forms';
import { SENTENCE } from './field-errors';
import { readMoney, writeMoney } from './money';
import { readClockTime, readHours, writeClockTime, writeHours } from './say-time';

/** How a figure is read from what a person types, and written back. */
export interface FigureReader {
  /** The figure; null where the text says none. */
  readonly read: (text: string) => number | null;
  readonly write: (value: number) => string;
  /** What to say where the text can't be read. */
  readonly sentence: string;
  /** What a phone's keyboard offers. */
  readonly keyboard: 'numeric' | 'decimal' | 'text';
}

/** Hands-on minutes, typed as hours: "7.5", "7:30", "45 min". */
export const HOURS: FigureReader = {
  read: readHours,
  write: writeHours,
  sentence: 'Write hours as 7.5, 7:30 or 45 min.',
  keyboard: 'text',
};

/** Minutes by the clock, typed as "2 d 4 h", "36 h" or "90 min". */
export const CLOCK_TIME: FigureReader = {
  read: readClockTime,
  write: writeClockTime,
  sentence: 'Write a time such as 90 min, 36 h or 2 d 4 h.',
  keyboard: 'text',
};

/** A whole number. */
export const WHOLE: FigureReader = {
  read: (text) => (/^[-−]?\d{1,7}$/.test(text.trim()) ? Number(text.trim().replace('−', '-')) : null),
  write: String,
  sentence: 'Write a whole number.',
  keyboard: 'numeric',
};

/** A number with or without decimals. */
export const DECIMAL: FigureReader = {
  read: (text) =>
    /^[-−]?\d{1,7}(?:[.,]\d{1,4})?$/.test(text.trim()) ? Number(text.trim().replace('−', '-').replace(',', '.')) : null,
  write: String,
  sentence: 'Write a number.',
  keyboard: 'decimal',
};

/** Per mille, typed as a factor: "1.2" for 1200. */
export const FACTOR: FigureReader = {
  read: (text) => {
    const value = DECIMAL.read(text);
    return value === null ? null : Math.round(value * 1000);
  },
  write: (permille) => String(permille / 1000),
  sentence: 'Write a number such as 1 or 0.8.',
  keyboard: 'decimal',
};

/** Per mille, typed as per cent: "12.5" for 125. */
export const PER_CENT: FigureReader = {
  read: (text) => {
    const value = DECIMAL.read(text);
    return value === null ? null : Math.round(value * 10);
  },
  write: (permille) => String(permille / 10),
  sentence: 'Write a number such as 10.',
  keyboard: 'decimal',
};

/** Money of a currency in minor units, typed as "18" or "18.50". */
export function moneyIn(currency: string): FigureReader {
  return {
    read: (text) => readMoney(text, currency),
    write: (minor) => writeMoney(minor, currency),
    sentence: 'Write an amount such as 18 or 18.50.',
    keyboard: 'decimal',
  };
}

/** Lets a text input hold a figure: a number as its value, null while it is empty or can't be read. */
@Directive({
  selector: 'input[fettleReads]',
  providers: [
    { provide: NG_VALUE_ACCESSOR, useExisting: forwardRef(() => ReadsText), multi: true },
    { provide: NG_VALIDATORS, useExisting: forwardRef(() => ReadsText), multi: true },
  ],
  host: {
    '(input)': 'take($any($event.target).value)',
    '(blur)': 'leave()',
    '[attr.inputmode]': 'reader().keyboard',
    autocomplete: 'off',
  },
})
export class ReadsText implements ControlValueAccessor, Validator {
  private readonly element = inject<ElementRef<HTMLInputElement>>(ElementRef);
  private changed: (value: number | null) => void = () => undefined;
  private touched: () => void = () => undefined;
  private unreadable = false;

  readonly reader = input.required<FigureReader>({ alias: 'fettleReads' });

  writeValue(value: number | null): void {
    this.unreadable = false;
    this.element.nativeElement.value = value === null ? '' : this.reader().write(value);
  }

  registerOnChange(changed: (value: number | null) => void): void {
    this.changed = changed;
  }

  registerOnTouched(touched: () => void): void {
    this.touched = touched;
  }

  setDisabledState(disabled: boolean): void {
    this.element.nativeElement.disabled = disabled;
  }

  validate(): ValidationErrors | null {
    return this.unreadable ? { [SENTENCE]: this.reader().sentence } : null;
  }

  protected take(text: string): void {
    const value = text.trim() === '' ? null : this.reader().read(text);
    this.unreadable = value === null && text.trim() !== '';
    this.changed(value);
  }

  /** Leaving a field writes what was understood, so that "90 min" is seen to be an hour and a half. */
  protected leave(): void {
    const { value } = this.element.nativeElement;
    const read = this.reader().read(value);
    if (read !== null) {
      this.element.nativeElement.value = this.reader().write(read);
    }
    this.touched();
  }
}
