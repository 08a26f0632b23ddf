import { httpDate, isUnchanged, secondsOfHttpDate } from './conditional';

// Source: RFC 9110 sections 5.6.7 (dates; its example is 784111777 s), 8.8.3 (ETag), 13.1.2, 13.1.3 and 13.2.2 (precedence).
const SECOND = 784_111_777;
const now = { etag: '"abc"', lastModifiedSeconds: SECOND };

describe('conditional requests', () => {
  it.each([
    ['nothing asked', undefined, undefined, false],
    ['its tag', '"abc"', undefined, true],
    ['its tag, told weak', 'W/"abc"', undefined, true],
    ['another tag', '"abd"', undefined, false],
    ['its tag among others', '"x", "abc"', undefined, true],
    ['its tag among others without spaces', '"x,y",W/"abc"', undefined, true],
    ['a tag that holds its own within', '"x"abc"', undefined, false],
    ['anything', '*', undefined, true],
    ['its tag without quotes', 'abc', undefined, false],
    ['an empty list', '', undefined, false],
    ['its date', undefined, 'Sun, 06 Nov 1994 08:49:37 GMT', true],
    ['its date in the obsolete spelling', undefined, 'Sunday, 06-Nov-94 08:49:37 GMT', true],
    ['its date as asctime writes it', undefined, 'Sun Nov  6 08:49:37 1994', true],
    ['a later date', undefined, 'Sun, 06 Nov 1994 08:49:38 GMT', true],
    ['an earlier date', undefined, 'Sun, 06 Nov 1994 08:49:36 GMT', false],
    ['what is no date', undefined, 'yesterday', false],
    ['a date of another standard', undefined, '1994-11-06T08:49:37Z', false],
    ['another tag and its date: the tag decides', '"abd"', 'Sun, 06 Nov 1994 08:49:37 GMT', false],
    ['its tag and an earlier date: the tag decides', '"abc"', 'Sun, 06 Nov 1994 08:49:36 GMT', true],
    ['an empty list and its date: the list decides', '', 'Sun, 06 Nov 1994 08:49:37 GMT', false],
  ])('%s', (_, ifNoneMatch, ifModifiedSince, unchanged) => {
    expect(isUnchanged({ ifNoneMatch, ifModifiedSince }, now)).toBe(unchanged);
  });

  it('trusts no date while its second may still change', () => {
    const fresh = { etag: '"abc"', lastModifiedSeconds: null };
    expect(isUnchanged({ ifNoneMatch: undefined, ifModifiedSince: httpDate(SECOND) }, fresh)).toBe(false);
    expect(isUnchanged({ ifNoneMatch: '"abc"', ifModifiedSince: undefined }, fresh)).toBe(true);
  });

  it('writes the preferred spelling and reads it back', () => {
    expect(httpDate(SECOND)).toBe('Sun, 06 Nov 1994 08:49:37 GMT');
    expect(secondsOfHttpDate(httpDate(SECOND))).toBe(SECOND);
  });
});
