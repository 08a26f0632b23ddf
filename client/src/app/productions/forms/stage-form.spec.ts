import {
  BLANK_STAGE,
  crewRow,
  placeRow,
  type StageDraft,
  stageControlPath,
  stageDraftOf,
  stageForm,
} from './stage-form';

const CRAFT = '6f0e8f4e-2f5b-4b7e-9f0a-0a1b2c3d4e5f';
const BAY = '7f0e8f4e-2f5b-4b7e-9f0a-0a1b2c3d4e5f';

const full: StageDraft = {
  name: 'Laminate',
  kind: 'make',
  handsOn: { lowMinutes: 60, likelyMinutes: 120, highMinutes: 240 },
  crew: [{ craftId: CRAFT, least: 1, most: 2 }],
  crewLossPermille: 50,
  continuity: 'session',
  places: [{ bayIds: [BAY], units: 2, hold: 'until-stage', untilStageId: CRAFT }],
  dwell: {
    materialId: BAY,
    milestone: 'demould',
    minutes: 720,
    attendedMinutes: 60,
    window: { kind: 'soft', minutes: 2880, extraMinutes: 60, costMinor: 1500 },
  },
  cautions: ['Mask on.', 'Extraction on.'],
  note: 'Two layers.',
  visitAt: null,
  replyMinutes: 0,
};

describe('stageForm', () => {
  it.each<[string, StageDraft]>([
    ['a full stage', full],
    ['a blank one', { ...BLANK_STAGE, name: 'x' }],
    ['a dwell of its own', { ...full, dwell: { ...full.dwell!, materialId: null, milestone: null, window: null } }],
    [
      'a sign-off with a visit',
      {
        ...BLANK_STAGE,
        name: 'Foam sign-off',
        kind: 'sign-off',
        visitAt: '2026-07-14T09:00:00.000Z',
        replyMinutes: 2880,
      },
    ],
  ])('gives back %s as it came', (_name, draft) => {
    expect(stageDraftOf(stageForm(draft, 'Europe/London'), 'Europe/London')).toEqual(draft);
  });

  it('forgets what does not belong to what was chosen', () => {
    const form = stageForm(full, 'Europe/London');
    form.controls.dwellSource.setValue('none');
    form.controls.places.at(0).controls.hold.setValue('work');
    const draft = stageDraftOf(form, 'Europe/London');
    expect(draft.dwell).toBeNull();
    expect(draft.places[0].untilStageId).toBeNull();
  });

  it('asks for a name, a craft and a bay', () => {
    expect(stageForm(BLANK_STAGE, 'UTC').valid).toBe(false);
    expect(crewRow({ craftId: '', least: 1, most: 1 }).valid).toBe(false);
    expect(placeRow({ bayIds: [], units: 1, hold: 'work', untilStageId: null }).valid).toBe(false);
  });

  it('knows where a fault of the draft belongs', () => {
    expect(stageControlPath(['handsOn', 'likelyMinutes'])).toEqual(['likely']);
    expect(stageControlPath(['dwell', 'window', 'minutes'])).toEqual(['windowMinutes']);
    expect(stageControlPath(['crew', '0', 'most'])).toEqual(['crew', '0', 'most']);
    expect(stageControlPath(['cautions', '3'])).toEqual(['cautions']);
  });
});
