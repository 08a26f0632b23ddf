import { formatDay, formatMinutes } from '../time/format-instant';
import type { Minute } from '../time/span';
import type { Measure } from './measure';

/** Names of what measures speak of, and how an instant is written in the studio's zone. */
export interface MeasureNames {
  readonly maker: (id: string) => string;
  readonly craft: (id: string) => string;
  readonly bay: (id: string) => string;
  readonly stage: (id: string) => string;
  readonly material: (id: string) => string;
  readonly piece: (id: string) => string;
  readonly format: (at: Minute) => string;
}

/** A measure in a sentence without its full stop. */
export function sayMeasure(measure: Measure, names: MeasureNames): string {
  switch (measure.kind) {
    case 'overtime':
      return `${names.maker(measure.makerId)} stays ${formatMinutes(measure.minutesADay)} longer each day until ${formatDay(measure.until)}`;
    case 'weekend-shift':
      return `${names.maker(measure.makerId)} works ${formatMinutes(measure.minutes)} on ${formatDay(measure.day)}`;
    case 'freelancer':
      return `A freelancer for ${names.craft(measure.craftId).toLowerCase()}, ${measure.days} days from ${formatDay(measure.from)}`;
    case 'heat':
      return `Keep ${names.bay(measure.bayId)} at ${measure.celsius} °C until ${names.format(measure.until)}`;
    case 'second-mould':
      return `A second ${names.bay(measure.bayId)}`;
    case 'faster-material':
      return `${names.material(measure.materialId)} for ${names.stage(measure.stageId)}`;
    case 'earlier-sign-off':
      return `The answer to ${names.stage(measure.stageId)} within ${formatMinutes(measure.replyMinutes)}`;
    case 'part-delivery':
      return `Deliver only ${measure.pieceIds.map(names.piece).join(', ')} for it; the rest follows`;
    case 'later-date':
      return `Ask for ${names.format(measure.at)} instead`;
  }
}

/** What to mind with a measure; empty where there is nothing. Cautions to settings: local law and licensed practice decide. */
export function cautionOf(measure: Measure): string {
  switch (measure.kind) {
    case 'overtime':
    case 'weekend-shift':
      return 'Only what they agree to, within the law on working time and rest. Nobody alone with moving machines or solvents.';
    case 'heat':
      return 'No open flame or glowing element near solvents, resin or dust; keep the extraction on and within the maker’s data sheet.';
    case 'faster-material':
      return 'Read its data sheet: shorter pot life, more heat, other fumes. Try it on an offcut first.';
    case 'freelancer':
      return 'They need the same instruction, fitted masks and insurance as the crew.';
    case 'second-mould':
    case 'earlier-sign-off':
    case 'part-delivery':
    case 'later-date':
      return '';
  }
}
