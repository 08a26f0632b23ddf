import fc from 'fast-check';
import { foldLines } from './fold-lines';

// Source: RFC 5545 section 3.1.
describe('foldLines', () => {
  const line = fc.string({ unit: 'grapheme', maxLength: 400 }).map((text) => text.replace(/[\r\n]/g, '').trimStart());

  it('keeps every line within 75 octets, splits no character, and is undone by unfolding', () => {
    fc.assert(
      fc.property(fc.array(line), (lines) => {
        const text = lines.map((one) => `${one}\r\n`).join('');
        const folded = foldLines(text);
        for (const one of folded.split('\r\n')) {
          const octets = Buffer.from(one);
          expect(octets.length).toBeLessThanOrEqual(75);
          expect(octets.toString()).toBe(one);
        }
        expect(folded.replaceAll('\r\n ', '')).toBe(text);
      }),
    );
  });

  it.each([75, 76, 149, 150])('uses the whole of a line of %i octets', (length) => {
    const folded = foldLines(`${'x'.repeat(length)}\r\n`).split('\r\n');
    // 75 octets on the first line and 74 beside the space on every other.
    expect(folded.length - 1).toBe(1 + Math.ceil((length - 75) / 74));
  });
});
