import { readMoney, writeMoney } from './money';

// Minor units by ISO 4217: GBP has two decimals, JPY none.
describe('money', () => {
  it.each([
    ['18', 'GBP', 1800],
    ['18.5', 'GBP', 1850],
    ['1,250.05', 'GBP', 125005],
    ['1250', 'JPY', 1250],
  ])('reads %s %s', (text, currency, minor) => {
    expect(readMoney(text, currency)).toBe(minor);
  });

  it.each(['', 'eighteen', '1.234', '-5', '£5'])('does not read “%s”', (text) => {
    expect(readMoney(text, 'GBP')).toBeNull();
  });

  it('writes what it reads', () => {
    expect(writeMoney(1850, 'GBP')).toBe('18.50');
    expect(writeMoney(1850, 'JPY')).toBe('1850');
  });
});
