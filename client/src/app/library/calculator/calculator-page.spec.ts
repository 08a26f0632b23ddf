import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component, input, signal } from '@angular/core';
import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { Plot } from '../../ui/plot/plot';
import { STUDIO_CLOCK } from '../../ui/studio-clock';
import { CalculatorPage } from './calculator-page';

/** Stands for the plot: jsdom has no canvas. */
@Component({ selector: 'fettle-plot', changeDetection: ChangeDetectionStrategy.OnPush, template: '' })
class NoPlot {
  readonly label = input.required<string>();
  readonly draw = input.required<unknown>();
}

const NOW = Date.UTC(2026, 11, 1, 9, 0);
const material = {
  id: '6f0e8f4e-2f5b-4b7e-9f0a-0a1b2c3d4e5f',
  name: 'Casting resin',
  family: 'epoxy',
  referenceCelsius: 20,
  referenceHumidityPercent: 50,
  attendedMinutes: 0,
  dwells: [
    {
      milestone: 'demould',
      minutes: { low: 480, likely: 600, high: 1200 },
      law: { kind: 'factor-per-10-degrees', factor: 2 },
      minimumCelsius: 10,
      maximumCelsius: 40,
      source: 'made up for this check',
    },
  ],
  cautions: ['Gloves on.'],
  note: '',
  version: 1,
};

async function settle(fixture: ComponentFixture<CalculatorPage>): Promise<void> {
  fixture.detectChanges();
  await new Promise((resolve) => setTimeout(resolve));
  fixture.detectChanges();
}

async function openPage(celsius: number): Promise<ComponentFixture<CalculatorPage>> {
  const clock = { zone: signal('UTC'), viewerZone: 'UTC', now: () => NOW };
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(),
      provideHttpClientTesting(),
      provideRouter([]),
      { provide: STUDIO_CLOCK, useValue: clock },
    ],
  });
  TestBed.overrideComponent(CalculatorPage, { remove: { imports: [Plot] }, add: { imports: [NoPlot] } });
  const fixture = TestBed.createComponent(CalculatorPage);
  await settle(fixture);
  const http = TestBed.inject(HttpTestingController);
  http.expectOne('/api/materials').flush([material]);
  const week = [{ from: NOW / 60_000, celsius, humidityPercent: 50 }];
  await settle(fixture);
  http
    .expectOne('/api/climates')
    .flush([{ bayId: null, name: 'The studio', profile: null, readings: null, week, version: 0 }]);
  await settle(fixture);
  return fixture;
}

function textOf(fixture: ComponentFixture<CalculatorPage>): string {
  return ((fixture.nativeElement as HTMLElement).textContent ?? '').replaceAll(/\s+/g, ' ');
}

function type(fixture: ComponentFixture<CalculatorPage>, label: string, value: string): void {
  const fields = [...(fixture.nativeElement as HTMLElement).querySelectorAll('mat-form-field')];
  const field = fields.find((one) => one.querySelector('label')?.textContent?.includes(label));
  const box = field?.querySelector('input');
  if (!box) throw new Error(`There is no field ${label}.`);
  box.value = value;
  box.dispatchEvent(new Event('input'));
  box.dispatchEvent(new Event('blur'));
}

describe('the calculator', () => {
  it('answers from now in the studio, with the source and the cautions', async () => {
    const text = textOf(await openPage(20));
    expect(text).toContain('Tue 1 Dec 19:00');
    expect(text).toContain('Source: made up for this check.');
    expect(text).toContain('Gloves on.');
    expect(text).not.toContain('How late may I start?');
  });

  it('tells how late it may start and how warm would do, once it is said by when', async () => {
    const fixture = await openPage(20);
    type(fixture, 'Ready by, day', '2026-12-01');
    type(fixture, 'Ready by, time', '14:00');
    await settle(fixture);
    const text = textOf(fixture);
    expect(text).toContain('How late may I start?Tue 1 Dec 04:00that is past');
    expect(text).toContain('What temperature would do it?30 °C');
  });

  it('says in a sentence what never ends', async () => {
    expect(textOf(await openPage(5))).toContain('It does not get there: it stays at 5 °C');
  });

  it('answers nothing while a field is wrong, and says so there', async () => {
    const fixture = await openPage(20);
    type(fixture, 'Starts on', '');
    await settle(fixture);
    expect(textOf(fixture)).toContain('This is needed.');
    expect(textOf(fixture)).not.toContain('When is it ready?');
  });
});
