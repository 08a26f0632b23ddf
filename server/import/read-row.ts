import { CONTINUITIES, STAGE_KINDS, type StageDwell } from '@common/contract/stage';
import { stageFaults } from '@common/domain/stage-rules';
import { MOST_BAYS, MOST_CRAFTS, nthColumn, type Column } from './columns';
import type { CsvRow } from './csv-table';
import type { FaultList } from './fault-list';
import { readDecimal, readHours, readList, readLocalInstant, readMoney, readWhole, readWord } from './read-cell';
import { RowReader, shortened } from './row-reader';
import type { KnownWords, RowAfter, RowCrew, RowPlace, RowStage } from './row-stage';

const LONGEST_NAME = 120;
const LONGEST_NOTE = 4000;
const MOST_CAUTIONS = 20;
const LONGEST_CAUTION = 400;
const MOST_WAITS = 20;

/** Reads one row by itself; null where something in it is wrong, which then stands in `faults`. */
export function readRow(row: CsvRow, known: KnownWords, faults: FaultList): RowStage | null {
  const reader = new RowReader(row, faults);
  const pieceName = readName(reader, 'piece');
  const name = readName(reader, 'stage');
  const kind = reader.read('kind', (text) => readWord(text, STAGE_KINDS)) ?? 'make';
  const handsOn = readHandsOn(reader, kind);
  const continuity = reader.read('continuity', (text) => readWord(text, CONTINUITIES)) ?? 'shifts';
  const crew = readCrew(reader, known);
  const loss = reader.read('crew loss percent', readDecimal) ?? 0;
  if (loss > 50) reader.fault(() => 'The crew loss percent can be 50 at most.');
  const stage: RowStage = {
    line: reader.line,
    pieceName,
    draft: {
      name,
      kind,
      handsOn,
      crew: [...crew],
      crewLossPermille: Math.round(loss * 10),
      continuity,
      dwell: readDwell(reader, known, crew.length > 0),
      cautions: [...readCautions(reader)],
      note: readNote(reader),
      visitAt: reader.read('visit', (text) => readLocalInstant(text, known.zone)),
      replyMinutes: reader.read('reply hours', readHours) ?? 0,
    },
    places: readPlaces(reader, known),
    after: readAfter(reader),
  };
  if (reader.isSound) tellStageFaults(stage, reader);
  return reader.isSound ? stage : null;
}

/** The trade's own rules, which every stage is held to. */
function tellStageFaults({ draft, places }: RowStage, reader: RowReader): void {
  const whole = { ...draft, places: places.map(({ until: _until, ...place }) => ({ ...place, untilStageId: null })) };
  for (const { sentence } of stageFaults(whole)) reader.fault(() => sentence);
}

function readName(reader: RowReader, column: 'piece' | 'stage'): string {
  const name = reader.text(column).replace(/\s+/g, ' ');
  if (name === '') reader.fault(() => `The ${column} is missing.`);
  if (name.length > LONGEST_NAME) reader.fault(() => `The ${column} is longer than ${LONGEST_NAME} characters.`);
  return name;
}

function readHandsOn(reader: RowReader, kind: RowStage['draft']['kind']): RowStage['draft']['handsOn'] {
  const likely = reader.read('likely hours', readHours);
  if (likely === null && reader.text('likely hours') === '' && kind === 'make') {
    reader.fault(() => 'The likely hours are missing; write 0 if nobody’s hands are needed.');
  }
  const likelyMinutes = likely ?? 0;
  const lowMinutes = reader.read('low hours', readHours) ?? likelyMinutes;
  const highMinutes = reader.read('high hours', readHours) ?? likelyMinutes;
  return { lowMinutes, likelyMinutes, highMinutes };
}

function readCrew(reader: RowReader, known: KnownWords): readonly RowCrew[] {
  const crew: RowCrew[] = [];
  for (let nth = 1; nth <= MOST_CRAFTS; nth += 1) {
    const column = nthColumn('craft', nth);
    const text = reader.text(column);
    const least = reader.read(nthColumn('makers least', nth), (cell) => readWhole(cell, 1, 12));
    const most = reader.read(nthColumn('makers most', nth), (cell) => readWhole(cell, 1, 12));
    if (text === '') {
      if (least !== null || most !== null) reader.fault(() => `There are makers but no ${column}.`);
      continue;
    }
    const craft = reader.find(column, text, known.crafts, (one) => one.key);
    if (craft) crew.push({ craftId: craft.id, least: least ?? 1, most: most ?? least ?? 1 });
  }
  return crew;
}

function readPlaces(reader: RowReader, known: KnownWords): readonly RowPlace[] {
  const places: RowPlace[] = [];
  for (let nth = 1; nth <= MOST_BAYS; nth += 1) {
    const column = nthColumn('bay', nth);
    const names = readList(reader.text(column));
    const units = reader.read(nthColumn('units', nth), (cell) => readWhole(cell, 1, 50));
    const hold = readHold(reader, nthColumn('hold', nth));
    if (names.length === 0) {
      if (units !== null || hold !== null) reader.fault(() => `There are units or a hold, but no ${column}.`);
      continue;
    }
    const bays = names.flatMap((name) => reader.find(column, name, known.bays) ?? []);
    const bayIds = [...new Set(bays.map((bay) => bay.id))];
    places.push({ bayIds, units: units ?? 1, ...(hold ?? { hold: 'work', until: null }) });
  }
  return places;
}

function readHold(reader: RowReader, column: Column): Pick<RowPlace, 'hold' | 'until'> | null {
  const text = reader.text(column);
  const until = /^until\s*:?\s*(.+)$/is.exec(text);
  if (until) return { hold: 'until-stage', until: until[1].replace(/\s+/g, ' ').trim() };
  const hold = reader.read(column, (cell) => {
    const word = readWord(cell, ['work', 'dwell'] as const);
    return word.kind === 'value'
      ? word
      : { kind: 'fault', says: 'is not “work”, “dwell” or “until” with the name of a stage' };
  });
  return hold === null ? null : { hold, until: null };
}

function readDwell(reader: RowReader, known: KnownWords, hasCrew: boolean): StageDwell | null {
  const hours = reader.read('dwell hours', readHours);
  const named = reader.text('material');
  const milestone = reader.text('milestone');
  const attended = reader.read('attended hours', readHours);
  const window = readWindow(reader, known.currencyDecimals);
  if (named === '') {
    if (milestone !== '') reader.fault(() => 'There is a milestone but no material.');
    if (hours === null) {
      if (attended !== null || window !== null)
        reader.fault(() => 'There is a window or attended hours, but no dwell.');
      return null;
    }
    return { materialId: null, milestone: null, minutes: hours, attendedMinutes: attended ?? 0, window };
  }
  const material = reader.find('material', named, known.materials);
  if (!material) return null;
  const steps = material.milestones.map((step) => ({ ...step, name: step.milestone }));
  if (milestone === '') {
    const names = steps.map((step) => step.name).join(', ');
    reader.fault(() => `Name the milestone of ${material.name} that is waited for: ${names || 'it has none yet'}.`);
    return null;
  }
  const step = reader.find('milestone', milestone.replace(/\s+/g, '-'), steps);
  return step
    ? {
        materialId: material.id,
        milestone: step.milestone,
        minutes: hours ?? step.likelyMinutes,
        // Nobody stays by what nobody made.
        attendedMinutes: attended ?? (hasCrew ? material.attendedMinutes : 0),
        window,
      }
    : null;
}

function readWindow(reader: RowReader, decimals: number): StageDwell['window'] {
  const kind = reader.read('window', (text) => readWord(text, ['hard', 'soft'] as const));
  const minutes = reader.read('window hours', readHours);
  const extraMinutes = reader.read('window extra hours', readHours);
  const costMinor = reader.read('window cost', (text) => readMoney(text, decimals));
  if (kind === null) {
    if (minutes !== null) reader.fault(() => 'There are window hours: say whether the window is “hard” or “soft”.');
    return null;
  }
  if (minutes === null) {
    if (reader.text('window hours') === '') reader.fault(() => 'The window hours are missing.');
    return null;
  }
  if (kind === 'hard' && (extraMinutes !== null || costMinor !== null)) {
    reader.fault(() => 'A hard window is never missed, so it has no extra hours and no cost.');
  }
  return { kind, minutes, extraMinutes: extraMinutes ?? 0, costMinor: costMinor ?? 0 };
}

function readAfter(reader: RowReader): RowAfter {
  const text = reader.text('after');
  if (text === '') return { kind: 'above' };
  if (/^[-–—]$/.test(text)) return { kind: 'nothing' };
  const names = readList(text).map((item) => {
    const [stage, ...pieces] = item
      .split('>')
      .reverse()
      .map((part) => part.replace(/\s+/g, ' ').trim());
    return { piece: pieces.length === 0 ? null : [...pieces].reverse().join(' > '), stage };
  });
  if (names.length > MOST_WAITS) reader.fault(() => `A stage can wait for ${MOST_WAITS} others at most.`);
  const unnamed = names.some(({ piece, stage }) => stage === '' || piece === '');
  if (unnamed)
    reader.fault(() => `The after “${shortened(text)}” names no stage. Write “Piece > Stage”, or the stage alone.`);
  return { kind: 'named', names };
}

function readCautions(reader: RowReader): readonly string[] {
  const cautions = readList(reader.text('cautions'));
  if (cautions.length > MOST_CAUTIONS) reader.fault(() => `There can be ${MOST_CAUTIONS} cautions at most.`);
  if (cautions.some((caution) => caution.length > LONGEST_CAUTION)) {
    reader.fault(() => `A caution is longer than ${LONGEST_CAUTION} characters.`);
  }
  return cautions;
}

function readNote(reader: RowReader): string {
  const note = reader.text('note');
  if (note.length > LONGEST_NOTE) reader.fault(() => `The note is longer than ${LONGEST_NOTE} characters.`);
  return note;
}
