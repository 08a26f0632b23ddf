import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { MarkChip } from './mark-chip';
import { Moment } from './moment';
import { Notice } from './notice';
import { PageHeading } from './page-heading';
import { WeekStrip } from './patterns';
import { hueColour } from './production-hues';
import { STUDIO_CLOCK } from './studio-clock';
import {
  MarkChipHarness,
  MomentHarness,
  NoticeHarness,
  PageHeadingHarness,
  WeekStripHarness,
} from './testing/part-harnesses';

@Component({
  selector: 'fettle-parts-under-test',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MarkChip, Moment, Notice, PageHeading, WeekStrip],
  template: `
    <fettle-page-heading title="Crew" lead="The makers" />
    <fettle-mark-chip mark="Me" [hue]="4" /> <fettle-mark-chip mark="Go" [hue]="3" name="The Glass Orchard" />
    <fettle-notice tone="caution" text="Gloves on." /> <fettle-notice tone="fault" text="No." />
    <fettle-moment at="2026-07-14T08:10:00Z" /> <fettle-moment at="2026-07-14T08:10:00Z" shape="time" />
    <fettle-week-strip
      monday="2026-11-30"
      [patterns]="patterns"
      [away]="[{ days: { from: '2026-12-02', until: '2026-12-03' }, word: 'Leave' }]"
    />
  `,
})
class Parts {
  readonly patterns = [
    {
      firstDay: '2026-01-05',
      rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE',
      startMinuteOfDay: 480,
      lengthMinutes: 510,
      exceptDays: [],
      kind: 'ordinary' as const,
    },
  ];
}

function setUp(viewerZone: string) {
  const clock = { zone: signal('Europe/London'), viewerZone, now: () => Date.parse('2026-12-01T09:00:00Z') };
  TestBed.configureTestingModule({ providers: [{ provide: STUDIO_CLOCK, useValue: clock }] });
  return TestbedHarnessEnvironment.loader(TestBed.createComponent(Parts));
}

describe('parts', () => {
  it('head a page', async () => {
    const heading = await setUp('Europe/London').getHarness(PageHeadingHarness);
    expect(await heading.title()).toBe('Crew');
    expect(await heading.text()).toContain('The makers');
  });

  it('leave a mark beside its name to the eye, and say the name where there is none', async () => {
    const [beside, alone] = await setUp('Europe/London').getAllHarnesses(MarkChipHarness);
    expect(await beside.isDecorative()).toBe(true);
    expect(await alone.isDecorative()).toBe(false);
    expect(await alone.text()).toBe('Go, The Glass Orchard');
  });

  it('tell cautions and faults by more than colour', async () => {
    const [caution, fault] = await setUp('Europe/London').getAllHarnesses(NoticeHarness);
    expect(await caution.text()).toBe('Caution: Gloves on.');
    expect(await caution.role()).toBeNull();
    expect(await fault.role()).toBe('alert');
  });

  it('tell an instant in the studio’s zone alone where the viewer’s clock reads the same', async () => {
    const [moment, time] = await setUp('Europe/London').getAllHarnesses(MomentHarness);
    expect(await moment.text()).toBe('Tue 14 Jul 09:10');
    expect(await time.text()).toBe('09:10');
    expect(await moment.instant()).toBe('2026-07-14T08:10:00Z');
  });

  it('tell it by the viewer’s clock too where that differs', async () => {
    const [moment] = await setUp('America/New_York').getAllHarnesses(MomentHarness);
    expect((await moment.text()).replace(/\s+/g, ' ')).toBe('Tue 14 Jul 09:10 (Tue 14 Jul 04:10 for you)');
  });

  it('show a week with its leave', async () => {
    const strip = await setUp('Europe/London').getHarness(WeekStripHarness);
    const days = await strip.days();
    expect(days).toEqual(['Mon 30 8 h 30', 'Tue 1 8 h 30', 'Wed 2 Leave', 'Thu 3 –', 'Fri 4 –', 'Sat 5 –', 'Sun 6 –']);
  });

  it('let hues come round again beyond the last', () => {
    expect(hueColour(10)).toBe(hueColour(0));
    expect(hueColour(2, 'on')).toBe('var(--hue-2-on)');
  });
});
