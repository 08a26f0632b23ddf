import { FormArray, FormControl, FormGroup, Validators } from '@angular/forms';
import { Name } from '@common/contract';
import { keeps, sayError, showFaults } from './field-errors';

const form = () =>
  new FormGroup({
    name: new FormControl('x'),
    handsOn: new FormGroup({ likelyMinutes: new FormControl(1) }),
    crew: new FormArray([new FormGroup({ most: new FormControl(1) })]),
  });

describe('showFaults', () => {
  it('puts each fault at the field that its JSON pointer (RFC 6901) names', () => {
    const group = form();
    const placeless = showFaults(group, [
      { pointer: '/name', detail: 'Give it a name.' },
      { pointer: '/handsOn/likelyMinutes', detail: 'Too few.' },
      { pointer: '/crew/0/most', detail: 'Too many.' },
    ]);
    expect(placeless).toEqual([]);
    expect(sayError(group.controls.name.errors)).toBe('Give it a name.');
    expect(sayError(group.controls.handsOn.controls.likelyMinutes.errors)).toBe('Too few.');
    expect(sayError(group.get(['crew', 0, 'most'])?.errors ?? null)).toBe('Too many.');
    expect(group.controls.name.touched).toBe(true);
  });

  it('gives back the faults for which the form has no field', () => {
    const fault = { pointer: '/elsewhere', detail: 'No.' };
    expect(showFaults(form(), [fault, { pointer: '', detail: 'All of it.' }])).toHaveLength(2);
  });

  it('keeps a fault at the field on the way where there is none below it', () => {
    const group = form();
    expect(showFaults(group, [{ pointer: '/name/0', detail: 'Odd.' }])).toEqual([]);
    expect(sayError(group.controls.name.errors)).toBe('Odd.');
  });

  it('lets a form of another shape say where a fault belongs', () => {
    const group = form();
    showFaults(group, [{ pointer: '/dwell/minutes', detail: 'No.' }], () => ['name']);
    expect(sayError(group.controls.name.errors)).toBe('No.');
  });

  it('forgets a fault as soon as its field is changed', () => {
    const group = form();
    showFaults(group, [{ pointer: '/name', detail: 'Give it a name.' }]);
    group.controls.name.setValue('Moon');
    expect(group.controls.name.errors).toBeNull();
  });
});

describe('sayError', () => {
  it('says the sentence of a rule of the contract', () => {
    expect(sayError(new FormControl('  ', keeps(Name)).errors)).toBe('Give it a name.');
    expect(new FormControl('Moon', keeps(Name)).errors).toBeNull();
  });

  it.each([
    [Validators.required, '', 'This is needed.'],
    [Validators.min(2), 1, 'At least 2.'],
    [Validators.max(2), 3, 'At most 2.'],
    [Validators.email, 'nobody', 'Write the whole e-mail address.'],
    [Validators.pattern(/a/), 'b', 'This is not right yet.'],
  ])('has plain words for the usual rules', (rule, value, sentence) => {
    expect(sayError(new FormControl<unknown>(value, rule).errors)).toBe(sentence);
  });
});
