/** Money in integer minor units of the studio's one currency (pence, cents). */
export type Minor = number;

/** Price of some working time at an hourly rate, rounded to the nearest minor unit. */
export function costOfMinutes(minutes: number, hourCostMinor: Minor): Minor {
  return Math.round((minutes * hourCostMinor) / 60);
}

/** A share in per mille of an amount, rounded to the nearest minor unit: overhead, margin, overtime. */
export function permilleOf(amount: Minor, permille: number): Minor {
  return Math.round((amount * permille) / 1000);
}

/** "£1,234.50": an amount in a currency by its ISO 4217 code, with as many decimals as the currency has. */
export function formatMoney(amount: Minor, currency: string): string {
  const format = new Intl.NumberFormat('en-GB', { style: 'currency', currency });
  const decimals = format.resolvedOptions().maximumFractionDigits ?? 2;
  return format.format(amount / 10 ** decimals);
}
