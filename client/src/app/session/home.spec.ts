import { homeOf, safeReturn } from './home';

describe('homeOf', () => {
  it('lands each role on its own first page', () => {
    expect([homeOf('owner'), homeOf('manager'), homeOf('maker'), homeOf('client')]).toEqual([
      '/plan',
      '/plan',
      '/day-sheet',
      '/client',
    ]);
  });
});

describe('safeReturn', () => {
  it.each(['/crew', '/productions/1?x=2#y'])('goes back to %s', (address) => {
    expect(safeReturn(address)).toBe(address);
  });

  // Open redirects: OWASP "Unvalidated Redirects and Forwards" lists these forms.
  it.each(['https://evil.example', '//evil.example', '/\\evil.example', 'javascript:alert(1)', '/sign-in', '', null])(
    'does not go to %s',
    (address) => {
      expect(safeReturn(address)).toBeNull();
    },
  );
});
