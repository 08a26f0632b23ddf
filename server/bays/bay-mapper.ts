import type { BayView } from '@common/contract';
import type { Bay } from '@database/entities';
import { patternOf } from '../storage/patterns';

export function bayView(bay: Bay): BayView {
  return {
    id: bay.id,
    name: bay.name,
    kind: bay.kind,
    capacity: bay.capacity,
    pieceId: bay.pieceId,
    temperatureCelsius: bay.temperatureCelsius,
    humidityPercent: bay.humidityPercent,
    size: bay.size,
    openings: [...bay.openings].sort((a, b) => a.position - b.position).map(patternOf),
    note: bay.note,
    active: bay.active,
    version: bay.version,
  };
}
