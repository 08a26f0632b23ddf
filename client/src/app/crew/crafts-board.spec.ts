import { CraftKey } from '@common/contract';
import { keyOf } from './crafts-board';

describe('keyOf', () => {
  it.each([
    ['Filling & sanding', 'filling-sanding'],
    ['  Papier-mâché  ', 'papier-mache'],
    ['3D printing', 'd-printing'],
    ['…', 'craft'],
    ['A'.repeat(80), 'a'.repeat(40)],
  ])('makes a key of %s that the contract takes', (name, key) => {
    expect(keyOf(name)).toBe(key);
    expect(CraftKey.safeParse(keyOf(name)).success).toBe(true);
  });
});
