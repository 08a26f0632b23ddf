import { inject, InjectionToken, Pipe, type PipeTransform, type Signal, signal } from '@angular/core';
import { formatMoney } from '@common/domain/money';

/** The studio's currency, ISO 4217. */
export const STUDIO_CURRENCY = new InjectionToken<Signal<string>>('studio currency', {
  providedIn: 'root',
  factory: () => signal('GBP'),
});

/** How many minor units one unit of a currency has: 100 for pounds and euros, 1 for yen. */
export function minorUnits(currency: string): number {
  const format = new Intl.NumberFormat('en', { style: 'currency', currency });
  return 10 ** (format.resolvedOptions().maximumFractionDigits ?? 2);
}

/** Integer minor units as money in the studio's currency: "£1,250.00". */
@Pipe({ name: 'money', pure: false })
export class MoneyPipe implements PipeTransform {
  private readonly currency = inject(STUDIO_CURRENCY);

  transform(minor: number): string {
    return formatMoney(minor, this.currency());
  }
}

/** Money as a person types it ("18", "18.50", "1,250") in minor units; null where it can't be read. */
export function readMoney(text: string, currency: string): number | null {
  const plain = text.trim().replace(/[,\s]/g, '');
  return /^\d{1,9}(?:\.\d{1,2})?$/.test(plain) ? Math.round(Number(plain) * minorUnits(currency)) : null;
}

/** Minor units as `readMoney` reads them back. */
export function writeMoney(minor: number, currency: string): string {
  const units = minorUnits(currency);
  return (minor / units).toFixed(units === 1 ? 0 : 2);
}
