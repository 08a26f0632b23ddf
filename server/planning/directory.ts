import type { Directory } from '@common/contract';
import { KEY_DATE_NAMES } from '@common/domain/key-date';
import { formatDayAndTime } from '@common/time/format-instant';
import type { FormatInstant, Names } from '@common/planning';
import type { Measure } from '@common/rescue';
import type { StudioRows } from './snapshot-repository';

/** Names for every id that a plan of these rows may use. */
export function directoryOf(rows: StudioRows, measures: readonly Measure[]): Directory {
  const productionOf = new Map(rows.pieces.map((piece) => [piece.id, piece.productionId]));
  return {
    productions: rows.productions.map(({ id, name, mark, hue, state, client }) => ({
      id,
      name,
      mark,
      hue,
      state,
      clientName: client.name,
    })),
    pieces: rows.pieces.map(({ id, productionId, name, position }) => ({ id, productionId, name, position })),
    stages: rows.stages.map((stage) => ({
      id: stage.id,
      pieceId: stage.pieceId,
      productionId: productionOf.get(stage.pieceId) ?? '',
      name: stage.name,
      position: stage.position,
      kind: stage.kind,
      state: stage.state,
      nth: stage.nth,
      of: stage.repeats,
      materialName: stage.dwellMaterial?.name ?? null,
      milestone: stage.dwellMilestone,
      cautions: stage.cautions,
      version: stage.version,
    })),
    makers: [
      ...rows.makers.map(({ id, name, initials }) => ({ id, name, initials })),
      ...freelancersOf(rows, measures),
    ],
    crafts: rows.crafts.map(({ id, key, name }) => ({ id, key, name })),
    bays: rows.bays.map(({ id, name, kind, pieceId }) => ({ id, name, kind, pieceId })),
    keyDates: rows.productions.flatMap(({ id: productionId, keyDates }) =>
      keyDates.map(({ id, kind }) => ({ id, productionId, kind })),
    ),
  };
}

/** Those whom the plan counts on and nobody has entered yet. */
function freelancersOf({ crafts }: StudioRows, measures: readonly Measure[]): Directory['makers'] {
  return measures.flatMap((measure) => {
    if (measure.kind !== 'freelancer') return [];
    const craft = crafts.find(({ id }) => id === measure.craftId)?.name.toLowerCase() ?? 'a craft';
    return [{ id: measure.makerId, name: `Freelancer for ${craft}`, initials: 'Fr' }];
  });
}

/** How sentences call what a directory lists; what it does not list is something that is there no more. */
export function namesOf(directory: Directory): Names {
  const piece = new Map(directory.pieces.map(({ id, name }) => [id, name]));
  const production = new Map(directory.productions.map(({ id, name }) => [id, name]));
  const stage = new Map(
    directory.stages.map(({ id, pieceId, name, nth, of }) => {
      const repeat = nth === null || of === null ? '' : ` (${String(nth)} of ${String(of)})`;
      return [id, `“${piece.get(pieceId) ?? '?'}: ${name}${repeat}”`];
    }),
  );
  const maker = new Map(directory.makers.map(({ id, name }) => [id, name]));
  const bay = new Map(directory.bays.map(({ id, name }) => [id, name]));
  const craft = new Map(directory.crafts.map(({ id, name }) => [id, name.toLowerCase()]));
  const keyDate = new Map(
    directory.keyDates.map(({ id, productionId, kind }) => [
      id,
      `the ${KEY_DATE_NAMES[kind].toLowerCase()} of ${production.get(productionId) ?? 'a production'}`,
    ]),
  );
  return {
    stage: (id) => stage.get(id) ?? 'a stage that was removed',
    maker: (id) => maker.get(id) ?? 'somebody who has left',
    bay: (id) => bay.get(id) ?? 'a bay that is gone',
    craft: (id) => craft.get(id) ?? 'a craft',
    keyDate: (id) => keyDate.get(id) ?? 'a key date',
    craftsperson: (id) => `maker for ${craft.get(id) ?? 'the craft'}`,
  };
}

/** Writes instants on the studio's clock, with the day because plans reach weeks ahead. */
export function formatIn(zone: string): FormatInstant {
  return (at) => formatDayAndTime(at, zone);
}
