import { type ExistingPiece, type PlannedStage, readStages } from '../read-stages';
import type { KnownWords } from '../row-stage';

export const KNOWN: KnownWords = {
  crafts: [
    { id: 'c1', key: 'laminating', name: 'Laminating' },
    { id: 'c2', key: 'painting', name: 'Painting' },
    { id: 'c3', key: 'filling-sanding', name: 'Filling & sanding' },
  ],
  bays: [
    { id: 'b1', name: 'Spray booth' },
    { id: 'b2', name: 'Long table' },
  ],
  materials: [
    {
      id: 'm1',
      name: 'Polyester laminating',
      attendedMinutes: 45,
      milestones: [
        { milestone: 'demould', likelyMinutes: 720 },
        { milestone: 'next-layer', likelyMinutes: 120 },
      ],
    },
  ],
  zone: 'Europe/London',
  currencyDecimals: 2,
};

export function read(csv: string, pieces: readonly ExistingPiece[] = []): readonly PlannedStage[] {
  const reading = readStages(csv, KNOWN, pieces);
  if (reading.kind === 'faults')
    throw new Error(reading.faults.map(({ line, detail }) => `${line}: ${detail}`).join('\n'));
  return reading.stages;
}

/** The faults of a file, as "line: sentence". */
export function faults(csv: string, pieces: readonly ExistingPiece[] = []): readonly string[] {
  const reading = readStages(csv, KNOWN, pieces);
  return reading.kind === 'faults' ? reading.faults.map(({ line, detail }) => `${line ?? '-'}: ${detail}`) : [];
}

export const HEAD = 'piece,stage,craft,likely hours,after';
