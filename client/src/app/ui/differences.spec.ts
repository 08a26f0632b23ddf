import { differencesOf } from './differences';

describe('differencesOf', () => {
  it('names the fields that were sent and differ, as both would be read', () => {
    const current = { name: 'Moon', note: '', size: { length: 2 }, active: true, crafts: [1], version: 4 };
    const sent = { name: 'Moon', note: 'Tall', size: { length: 3 }, active: false, crafts: [1, 2], version: 3 };
    const labels = { name: 'Name', note: 'Note', size: 'Size', active: 'In use', crafts: 'Crafts' };
    expect(differencesOf(current, sent, labels)).toEqual([
      { label: 'Note', theirs: 'nothing', mine: 'Tall' },
      { label: 'Size', theirs: '2', mine: '3' },
      { label: 'In use', theirs: 'yes', mine: 'no' },
      { label: 'Crafts', theirs: '1 in the list', mine: '2 in the list' },
    ]);
  });

  it('leaves out what was not sent and what has no name', () => {
    expect(differencesOf({ a: 1, b: 2 }, { b: 3 }, { a: 'A' })).toEqual([]);
  });
});
