import { LatestOnly } from './latest-only';

function desk() {
  const open: ((value: string) => void)[] = [];
  const run: string[] = [];
  const delivered: string[] = [];
  const latest = new LatestOnly<string, string>(
    (job) => {
      run.push(job);
      return new Promise((resolve) => open.push(resolve));
    },
    (result) => delivered.push(result),
  );
  const finish = async (result: string) => {
    open.shift()?.(result);
    await Promise.resolve();
    await Promise.resolve();
  };
  return { latest, run, delivered, finish };
}

describe('one job at a time, the newest', () => {
  it('passes over what was overtaken while another ran', async () => {
    const { latest, run, delivered, finish } = desk();
    ['a', 'b', 'c', 'd'].forEach((job) => latest.put(job));
    expect(run).toEqual(['a']);
    await finish('A');
    expect(run).toEqual(['a', 'd']);
    await finish('D');
    expect(delivered).toEqual(['A', 'D']);
  });

  it('delivers nothing that was asked before it was cleared', async () => {
    const { latest, run, delivered, finish } = desk();
    latest.put('a');
    latest.put('b');
    latest.clear();
    await finish('A');
    expect(run).toEqual(['a']);
    expect(delivered).toEqual([]);
    latest.put('c');
    await finish('C');
    expect(delivered).toEqual(['C']);
  });
});
