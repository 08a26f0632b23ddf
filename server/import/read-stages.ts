import type { FieldFault } from '@common/contract/problem-details';
import { readCsvTable } from './csv-table';
import { FaultList } from './fault-list';
import { readRow } from './read-row';
import { hint, shortened } from './row-reader';
import type { KnownWords, RowStage, StageName } from './row-stage';
import { waitingCircles } from './waiting-circles';

/** A piece that the production has already. */
export interface ExistingPiece {
  readonly id: string;
  readonly name: string;
  /** In their order. */
  readonly stages: readonly { readonly id: string; readonly name: string }[];
}

/** A stage of the file by its place among those read, or one that the production has already. */
export type StageRef =
  { readonly kind: 'new'; readonly index: number } | { readonly kind: 'existing'; readonly id: string };

/** A row with what it names found. */
export interface PlannedStage extends RowStage {
  /** The piece that is there already, or null for a new one of the row's name. */
  readonly existingPieceId: string | null;
  readonly waitsFor: readonly StageRef[];
  /** For each of its places, the stage until which it is held; null where it is not held until one. */
  readonly heldUntil: readonly (StageRef | null)[];
}

/** What a file comes to, or everything that is wrong with it. */
export type StagesReading =
  | { readonly kind: 'stages'; readonly stages: readonly PlannedStage[] }
  | { readonly kind: 'faults'; readonly faults: readonly FieldFault[] };

/** Reads stages from CSV text (see docs/import.md) against what the studio and the production have. All of it, or faults. */
export function readStages(csv: string, known: KnownWords, pieces: readonly ExistingPiece[]): StagesReading {
  const faults = new FaultList();
  const unread = new Set<string>();
  const rows = readCsvTable(csv, faults).flatMap((row) => {
    const read = readRow(row, known, faults);
    if (!read) unread.add(nameKey(row.cell('piece'), row.cell('stage')));
    return read ?? [];
  });
  const stages = new StageFinder(rows, pieces, unread, faults).stages();
  if (faults.count === 0) {
    tellCircles(stages, faults);
  }
  if (faults.count === 0 && stages.length === 0) {
    faults.add(1, () => 'There are no stages in the file.');
  }
  return faults.count === 0 ? { kind: 'stages', stages } : { kind: 'faults', faults: faults.all() };
}

interface NamedPiece {
  readonly name: string;
  readonly existingId: string | null;
  readonly byName: Map<string, { readonly name: string; readonly refs: StageRef[]; readonly line: number | null }>;
  /** The stage that a row without `after` follows. */
  last: StageRef | null;
}

/** Finds what rows name in one another and in the production. */
class StageFinder {
  readonly #pieces = new Map<string, NamedPiece>();
  readonly #above: (StageRef | null)[];

  constructor(
    private readonly rows: readonly RowStage[],
    existing: readonly ExistingPiece[],
    /** Stages of rows that are at fault themselves; that they can not be found is no second fault. */
    private readonly unread: ReadonlySet<string>,
    private readonly faults: FaultList,
  ) {
    for (const piece of existing) this.#addExisting(piece);
    this.#above = rows.map((row, index) => this.#addRow(row, index));
  }

  stages(): readonly PlannedStage[] {
    return this.rows.map((row, index) => ({
      ...row,
      existingPieceId: this.#pieces.get(row.pieceName.toLowerCase())?.existingId ?? null,
      waitsFor: this.#waitsFor(row, index),
      heldUntil: row.places.map(({ until }) => (until === null ? null : this.#heldUntil(row, until, index))),
    }));
  }

  #addExisting({ id, name, stages }: ExistingPiece): void {
    const piece: NamedPiece = { name, existingId: id, byName: new Map(), last: null };
    for (const stage of stages) {
      const ref: StageRef = { kind: 'existing', id: stage.id };
      const namesake = piece.byName.get(stage.name.toLowerCase());
      if (namesake) namesake.refs.push(ref);
      else piece.byName.set(stage.name.toLowerCase(), { name: stage.name, refs: [ref], line: null });
      piece.last = ref;
    }
    // Of two pieces of one name, the first is meant.
    if (!this.#pieces.has(name.toLowerCase())) this.#pieces.set(name.toLowerCase(), piece);
  }

  /** Enters a row under its piece, and answers with the stage above it there. */
  #addRow(row: RowStage, index: number): StageRef | null {
    const key = row.pieceName.toLowerCase();
    const piece: NamedPiece = this.#pieces.get(key) ?? {
      name: row.pieceName,
      existingId: null,
      byName: new Map(),
      last: null,
    };
    this.#pieces.set(key, piece);
    const above = piece.last;
    const { name } = row.draft;
    const namesake = piece.byName.get(name.toLowerCase());
    if (namesake) {
      const where = namesake.line === null ? 'is in the production already' : `stands on line ${namesake.line} already`;
      this.faults.add(
        row.line,
        () => `“${shortened(piece.name)}: ${shortened(name)}” ${where}. Give this one another name.`,
      );
    } else {
      piece.byName.set(name.toLowerCase(), { name, refs: [{ kind: 'new', index }], line: row.line });
    }
    piece.last = { kind: 'new', index };
    return above;
  }

  #waitsFor({ after, line, pieceName }: RowStage, index: number): readonly StageRef[] {
    switch (after.kind) {
      case 'nothing':
        return [];
      case 'above': {
        const above = this.#above[index];
        return above ? [above] : [];
      }
      case 'named': {
        const found = after.names.flatMap((name) => this.#find(name, pieceName, line, 'after') ?? []);
        return found.filter((ref, place) => found.findIndex((other) => isSame(ref, other)) === place);
      }
    }
  }

  #heldUntil({ pieceName, line }: RowStage, until: string, index: number): StageRef | null {
    const found = this.#find({ piece: null, stage: until }, pieceName, line, 'hold until');
    if (found?.kind === 'new' && found.index === index) {
      this.faults.add(line, () => 'A place can not be held until its own stage: name the later one that lets it go.');
      return null;
    }
    return found;
  }

  #find({ piece, stage }: StageName, ownPiece: string, line: number, column: string): StageRef | null {
    if (this.unread.has(nameKey(piece ?? ownPiece, stage))) return null;
    const among = this.#pieces.get((piece ?? ownPiece).toLowerCase());
    if (!among) {
      this.faults.add(line, () => {
        const names = [...this.#pieces.values()].map((one) => one.name);
        return `The ${column} “${shortened(piece ?? ownPiece)} > ${shortened(stage)}” names a piece that is not there. ${hint(piece ?? '', names)}`;
      });
      return null;
    }
    const found = among.byName.get(stage.toLowerCase());
    if (found?.refs.length === 1) return found.refs[0];
    this.faults.add(line, () => {
      if (found)
        return `The ${column} “${shortened(stage)}” is the name of ${found.refs.length} stages. Link it by hand after the import.`;
      const names = [...among.byName.values()].map((one) => one.name);
      return `The ${column} “${shortened(stage)}” is not a stage of “${shortened(among.name)}”. ${hint(stage, names)}`;
    });
    return null;
  }
}

/** Only rows of the file can wait in a circle: what was there before waits for none of them. */
function tellCircles(stages: readonly PlannedStage[], faults: FaultList): void {
  const waitsFor = stages.map((stage) => stage.waitsFor.flatMap((ref) => (ref.kind === 'new' ? [ref.index] : [])));
  for (const circle of waitingCircles(waitsFor)) {
    faults.add(stages[circle[0]].line, () => {
      const names = [...circle, circle[0]].slice(0, 12).map((index) => {
        const { pieceName, draft, line } = stages[index];
        return `“${shortened(pieceName)}: ${shortened(draft.name)}” (line ${line})`;
      });
      return `These stages wait for each other in a circle: ${names.join(' waits for ')}${circle.length > 11 ? ' …' : ''}.`;
    });
  }
}

function nameKey(piece: string, stage: string): string {
  return [piece, stage].map((name) => name.replace(/\s+/g, ' ').toLowerCase()).join(' > ');
}

function isSame(a: StageRef, b: StageRef): boolean {
  return a.kind === 'new' ? b.kind === 'new' && a.index === b.index : b.kind === 'existing' && a.id === b.id;
}
