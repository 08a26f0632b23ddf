import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatDialog } from '@angular/material/dialog';
import { ApiFailure } from '../api';
import { Confirm } from './confirm';
import { VersionedWrites } from './conflict-dialog';
import { FormDialog } from './form-dialog';
import { FormSave } from './form-save';
import { ConfirmDialogHarness, ConflictDialogHarness, FormDialogHarness } from './testing/dialog-harnesses';

@Component({ selector: 'fettle-blank', template: '', changeDetection: ChangeDetectionStrategy.OnPush })
class Blank {}

@Component({
  selector: 'fettle-form-under-test',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [FormDialog],
  template: `
    <fettle-form-dialog title="Add a bay" action="Add it" [save]="save" (submitted)="submitted()">
      <p>Fields</p>
    </fettle-form-dialog>
  `,
})
class FormUnderTest {
  readonly save = new FormSave();
  submitted(): void {
    this.save.say('Not yet.');
  }
}

const root = () => {
  // A dialog that is closed is gone at once, so that the next is not taken for it.
  TestBed.configureTestingModule({
    providers: [{ provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } }],
  });
  return TestbedHarnessEnvironment.documentRootLoader(TestBed.createComponent(Blank));
};
const conflict = (version: number, name: string) =>
  new ApiFailure({
    kind: 'version-conflict',
    status: 409,
    title: 'Meanwhile',
    detail: 'Someone was faster.',
    current: { name, version },
    sent: { name: 'Mine', version: version - 1 },
  });

describe('Confirm', () => {
  it.each([
    ['Remove it', true],
    ['Leave it', false],
  ])('takes “%s” for %s', async (button, answer) => {
    const loader = root();
    const asked = TestBed.inject(Confirm).ask({ title: 'Remove Moon?', text: 'For good.', action: 'Remove it' });
    const dialog = await loader.getHarness(ConfirmDialogHarness);
    expect(await dialog.text()).toContain('For good.');
    await dialog.press(button);
    await expect(asked).resolves.toBe(answer);
  });

  it('takes closing it for no', async () => {
    const loader = root();
    const asked = TestBed.inject(Confirm).ask({ title: 'Remove Moon?', text: 'For good.', action: 'Remove it' });
    await loader.getHarness(ConfirmDialogHarness);
    TestBed.inject(MatDialog).closeAll();
    await expect(asked).resolves.toBe(false);
  });
});

describe('VersionedWrites', () => {
  it('sends the version that was seen', async () => {
    const send = jest.fn().mockResolvedValue('saved');
    await expect(TestBed.inject(VersionedWrites).save({ version: 3, labels: {}, send })).resolves.toBe('saved');
    expect(send).toHaveBeenCalledWith(3);
  });

  it('shows both values where somebody was faster, and puts mine on top of theirs', async () => {
    const loader = root();
    const send = jest.fn().mockRejectedValueOnce(conflict(4, 'Theirs')).mockResolvedValueOnce('saved');
    const saving = TestBed.inject(VersionedWrites).save({ version: 3, labels: { name: 'Name' }, send });
    const dialog = await loader.getHarness(ConflictDialogHarness);
    expect(await dialog.differences()).toEqual([expect.stringMatching(/Name ?Theirs ?Mine/)]);
    await dialog.press('Put mine again');
    await expect(saving).resolves.toBe('saved');
    expect(send.mock.calls).toEqual([[3], [4]]);
  });

  it('keeps theirs where the person says so', async () => {
    const loader = root();
    const send = jest.fn().mockRejectedValue(conflict(4, 'Theirs'));
    const saving = TestBed.inject(VersionedWrites).save({ version: 3, labels: { name: 'Name' }, send });
    await (await loader.getHarness(ConflictDialogHarness)).press('Keep theirs');
    await expect(saving).resolves.toBeNull();
    expect(send).toHaveBeenCalledTimes(1);
  });

  it('asks again where somebody is faster twice', async () => {
    const loader = root();
    const send = jest
      .fn()
      .mockRejectedValueOnce(conflict(4, 'Theirs'))
      .mockRejectedValueOnce(conflict(5, 'Theirs again'))
      .mockResolvedValueOnce('saved');
    const saving = TestBed.inject(VersionedWrites).save({ version: 3, labels: { name: 'Name' }, send });
    await (await loader.getHarness(ConflictDialogHarness)).press('Put mine again');
    const [second, ...others] = await loader.getAllHarnesses(ConflictDialogHarness);
    expect(others).toEqual([]);
    expect(await second.differences()).toEqual([expect.stringContaining('Theirs again')]);
    await second.press('Put mine again');
    await expect(saving).resolves.toBe('saved');
    expect(send.mock.calls).toEqual([[3], [4], [5]]);
  });

  it('leaves every other failure to its caller', async () => {
    const failure = new ApiFailure({ kind: 'still-in-use', status: 409, title: 'a', detail: 'b' });
    const saving = TestBed.inject(VersionedWrites).save({
      version: 3,
      labels: {},
      send: () => Promise.reject(failure),
    });
    await expect(saving).rejects.toBe(failure);
  });
});

describe('FormDialog', () => {
  it('submits by its button and says what went wrong', async () => {
    const fixture = TestBed.createComponent(FormUnderTest);
    const form = await TestbedHarnessEnvironment.loader(fixture).getHarness(FormDialogHarness);
    expect(await form.messages()).toEqual([]);
    await form.press('Add it');
    expect(await form.messages()).toEqual(['Not yet.']);
  });
});
