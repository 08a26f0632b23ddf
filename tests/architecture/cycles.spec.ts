import { cycles } from './cycles';

const graph = (edges: Readonly<Record<string, readonly string[]>>) =>
  new Map(Object.entries(edges).map(([node, next]) => [node, new Set(next)]));

describe('cycles', () => {
  it('finds none where every way ends', () => {
    expect(cycles(graph({ a: ['b', 'c'], b: ['c'], c: [] }))).toEqual([]);
  });

  it('finds a long one, a short one and a node that leads to itself, each once', () => {
    const edges = { a: ['b'], b: ['c'], c: ['a', 'd'], d: ['e'], e: ['d'], f: ['f'], g: ['a'] };
    expect(cycles(graph(edges))).toEqual([['d', 'e'], ['a', 'b', 'c'], ['f']]);
  });
});
