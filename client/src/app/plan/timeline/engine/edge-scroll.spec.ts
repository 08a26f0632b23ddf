import { edgeSpeed } from './edge-scroll';

const window = { from: 200, to: 1200 };

describe('sliding the wall under a held stage', () => {
  it('stands still inside', () => {
    expect(edgeSpeed(700, window)).toBe(0);
    expect(edgeSpeed(300, window)).toBe(0);
  });

  it('slides towards the nearer edge, faster the nearer', () => {
    expect(edgeSpeed(1190, window)).toBeGreaterThan(edgeSpeed(1160, window));
    expect(edgeSpeed(1160, window)).toBeGreaterThan(0);
    expect(edgeSpeed(205, window)).toBeLessThan(0);
  });

  it('does not run away past the edge', () => {
    expect(edgeSpeed(5000, window)).toBe(edgeSpeed(1200, window));
  });
});
