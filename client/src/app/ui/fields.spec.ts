import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { FormControl, Validators } from '@angular/forms';
import { ChoiceField } from './choice-field';
import { ChoicesField } from './choices-field';
import { FigureField } from './figure-field';
import { NoteField } from './note-field';
import { CLOCK_TIME, FACTOR, HOURS, moneyIn } from './reads-text';
import { ChoiceFieldHarness, FigureFieldHarness, NoteFieldHarness, TextFieldHarness } from './testing/field-harnesses';
import { TextField } from './text-field';

@Component({
  selector: 'fettle-fields-under-test',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, ChoicesField, FigureField, NoteField, TextField],
  template: `
    <fettle-text-field label="Name" [control]="name" />
    <fettle-figure-field label="Hours" [reader]="hoursReader" [control]="hours" />
    <fettle-figure-field label="Pace" [reader]="factorReader" [control]="pace" />
    <fettle-figure-field label="Cost" [reader]="moneyReader" [control]="cost" />
    <fettle-figure-field label="Dwell" [reader]="clockReader" [control]="dwell" />
    <fettle-note-field label="Note" [control]="note" />
    <fettle-choice-field label="Kind" [control]="kind" [choices]="choices" (chosen)="times = times + 1" />
    <fettle-choices-field label="Bays" [control]="bays" [choices]="choices" />
  `,
})
class Fields {
  readonly name = new FormControl('', { nonNullable: true, validators: Validators.required });
  readonly hours = new FormControl<number | null>(450);
  readonly pace = new FormControl<number | null>(1200);
  readonly cost = new FormControl<number | null>(1850);
  readonly dwell = new FormControl<number | null>(2160);
  readonly note = new FormControl('', { nonNullable: true });
  readonly kind = new FormControl('a', { nonNullable: true });
  readonly bays = new FormControl<string[]>([], { nonNullable: true });
  readonly hoursReader = HOURS;
  readonly factorReader = FACTOR;
  readonly moneyReader = moneyIn('GBP');
  readonly clockReader = CLOCK_TIME;
  readonly choices = [
    { value: 'a', label: 'Table' },
    { value: 'b', label: 'Booth' },
  ];
  times = 0;
}

function setUp() {
  const fixture = TestBed.createComponent(Fields);
  return { fields: fixture.componentInstance, loader: TestbedHarnessEnvironment.loader(fixture) };
}

describe('fields', () => {
  it('show what a rule found wrong once they are left', async () => {
    const { loader } = setUp();
    const name = await loader.getHarness(TextFieldHarness.with({ label: 'Name' }));
    expect(await name.fault()).toBeNull();
    await name.write('');
    expect(await name.fault()).toBe('This is needed.');
    await name.write('Moon');
    expect(await name.fault()).toBeNull();
  });

  it('show a fault that the server found, however it came there', async () => {
    const { fields, loader } = setUp();
    const name = await loader.getHarness(TextFieldHarness.with({ label: 'Name' }));
    await name.write('Moon');
    fields.name.setErrors({ sentence: 'There is one already.' });
    fields.name.markAsTouched();
    expect(await name.fault()).toBe('There is one already.');
  });

  it.each([
    ['Hours', '7:30', '45 min', '0:45', 45],
    ['Pace', '1.2', '0.8', '0.8', 800],
    ['Cost', '18.50', '20', '20.00', 2000],
    ['Dwell', '1 d 12 h', '90 min', '1 h 30 min', 90],
  ] as const)('write and read figures the way people do: %s', async (label, first, typed, shown, value) => {
    const { fields, loader } = setUp();
    const field = await loader.getHarness(FigureFieldHarness.with({ label }));
    expect(await field.value()).toBe(first);
    await field.write(typed);
    expect(await field.value()).toBe(shown);
    const controls = { Hours: fields.hours, Pace: fields.pace, Cost: fields.cost, Dwell: fields.dwell };
    expect(controls[label].value).toBe(value);
  });

  it('say how to write a figure that can not be read, and hold none meanwhile', async () => {
    const { fields, loader } = setUp();
    const hours = await loader.getHarness(FigureFieldHarness.with({ label: 'Hours' }));
    await hours.write('a while');
    expect(await hours.fault()).toBe(HOURS.sentence);
    expect(fields.hours.value).toBeNull();
    expect(fields.hours.invalid).toBe(true);
    expect(await hours.value()).toBe('a while');
  });

  it('take several lines', async () => {
    const { fields, loader } = setUp();
    await (await loader.getHarness(NoteFieldHarness)).write('one\ntwo');
    expect(fields.note.value).toBe('one\ntwo');
  });

  it('choose one, and tell that a person chose', async () => {
    const { fields, loader } = setUp();
    const kind = await loader.getHarness(ChoiceFieldHarness.with({ label: 'Kind' }));
    expect(await kind.chosen()).toBe('Table');
    expect(fields.times).toBe(0);
    await kind.choose('Booth');
    expect(fields.kind.value).toBe('b');
    expect(fields.times).toBe(1);
  });

  it('choose several', async () => {
    const { fields, loader } = setUp();
    const bays = await loader.getHarness(ChoiceFieldHarness.with({ label: 'Bays' }));
    await bays.choose('Booth');
    await bays.choose('Table');
    expect(fields.bays.value).toEqual(['a', 'b']);
  });
});
