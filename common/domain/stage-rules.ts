import type { StageDraft } from './stage-draft';

/** Something wrong with a stage: where, as an RFC 6901 pointer into the draft, and a sentence that a person can act on. */
export interface StageFault {
  readonly pointer: string;
  readonly sentence: string;
}

/** Everything wrong with a stage beyond the shape of its fields; the form and the server ask the same. */
export function stageFaults(stage: StageDraft): readonly StageFault[] {
  return [
    ...handsOnFaults(stage),
    ...crewFaults(stage),
    ...placeFaults(stage),
    ...dwellFaults(stage),
    ...askFaults(stage),
  ];
}

function handsOnFaults({ handsOn }: StageDraft): readonly StageFault[] {
  const { lowMinutes, likelyMinutes, highMinutes } = handsOn;
  if (lowMinutes > likelyMinutes) {
    return [{ pointer: '/handsOn/lowMinutes', sentence: 'The low hours can not be more than the likely ones.' }];
  }
  if (likelyMinutes > highMinutes) {
    return [{ pointer: '/handsOn/highMinutes', sentence: 'The high hours can not be fewer than the likely ones.' }];
  }
  return [];
}

function crewFaults({ crew, kind, continuity, handsOn }: StageDraft): readonly StageFault[] {
  const faults: StageFault[] = crew.flatMap((want, i) =>
    want.least <= want.most
      ? []
      : [{ pointer: `/crew/${i}/most`, sentence: 'The most makers can not be fewer than the least.' }],
  );
  const crafts = crew.map((want) => want.craftId);
  if (new Set(crafts).size < crafts.length) {
    faults.push({ pointer: '/crew', sentence: 'Name each craft once and say how many makers.' });
  }
  if (crew.length === 0 && kind === 'make' && continuity !== 'clock' && handsOn.likelyMinutes > 0) {
    faults.push({ pointer: '/crew', sentence: 'Hands-on work needs a craft; without hands, let it run by the clock.' });
  }
  if (crew.length > 0 && continuity === 'clock') {
    faults.push({
      pointer: '/continuity',
      sentence: 'Makers keep to their shifts; only work without hands runs by the clock.',
    });
  }
  return faults;
}

function placeFaults({ places }: StageDraft): readonly StageFault[] {
  return places.flatMap((place, i) => {
    if (place.bayIds.length === 0) {
      return [{ pointer: `/places/${i}/bayIds`, sentence: 'Name at least one bay.' }];
    }
    return place.hold !== 'until-stage' && place.untilStageId !== null
      ? [{ pointer: `/places/${i}/untilStageId`, sentence: 'Only a place kept until a later stage names one.' }]
      : [];
  });
}

function dwellFaults({ dwell, crew }: StageDraft): readonly StageFault[] {
  if (dwell === null) {
    return [];
  }
  const faults: StageFault[] = [];
  if (dwell.window && dwell.window.minutes < dwell.minutes) {
    faults.push({ pointer: '/dwell/window/minutes', sentence: 'The window closes before the dwell is over.' });
  }
  if ((dwell.materialId === null) !== (dwell.milestone === null)) {
    faults.push({ pointer: '/dwell/milestone', sentence: 'A material and what is waited for go together.' });
  }
  if (dwell.attendedMinutes > 0 && crew.length === 0) {
    faults.push({ pointer: '/dwell/attendedMinutes', sentence: 'Somebody has to have done the work to stay by it.' });
  }
  return faults;
}

function askFaults({ kind, visitAt, replyMinutes }: StageDraft): readonly StageFault[] {
  if (kind === 'sign-off' && visitAt === null && replyMinutes === 0) {
    return [{ pointer: '/replyMinutes', sentence: 'Say when the client visits, or how long an answer usually takes.' }];
  }
  return [];
}
