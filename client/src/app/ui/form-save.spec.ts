import { FormControl, FormGroup, Validators } from '@angular/forms';
import { ApiFailure } from '../api';
import { FormSave } from './form-save';

const form = () => new FormGroup({ name: new FormControl('Moon', Validators.required) });

describe('FormSave', () => {
  it('gives what the saving gave, and is busy meanwhile', async () => {
    const save = new FormSave();
    let finish = (_value: number): void => undefined;
    const running = save.run(form(), () => new Promise<number>((resolve) => (finish = resolve)));
    expect(save.busy()).toBe(true);
    finish(7);
    await expect(running).resolves.toBe(7);
    expect(save.busy()).toBe(false);
    expect(save.messages()).toEqual([]);
  });

  it('does not save what is not filled in rightly', async () => {
    const save = new FormSave();
    const group = form();
    group.controls.name.setValue('');
    const send = jest.fn();
    await expect(save.run(group, send)).resolves.toBeUndefined();
    expect(send).not.toHaveBeenCalled();
    expect(group.controls.name.touched).toBe(true);
    expect(save.messages()).toHaveLength(1);
  });

  it('does not save twice at a time', async () => {
    const save = new FormSave();
    const first = save.run(form(), () => new Promise((resolve) => setTimeout(() => resolve(1))));
    await expect(save.run(form(), () => Promise.resolve(2))).resolves.toBeUndefined();
    await expect(first).resolves.toBe(1);
  });

  it('puts what the server found wrong beside the fields, and says the rest', async () => {
    const save = new FormSave();
    const group = form();
    const failure = new ApiFailure({
      kind: 'invalid-input',
      status: 422,
      title: 'No',
      detail: 'Something is not right.',
      faults: [
        { pointer: '/name', detail: 'Taken.' },
        { pointer: '/other', detail: 'Odd.' },
      ],
    });
    await expect(save.run(group, () => Promise.reject(failure))).resolves.toBeUndefined();
    expect(group.controls.name.errors).toEqual({ sentence: 'Taken.' });
    expect(save.messages()).toEqual(['Something is not right.', 'Odd.']);
  });
});
