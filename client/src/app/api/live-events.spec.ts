import { TestBed } from '@angular/core/testing';
import { LiveEvents, OPEN_EVENT_SOURCE, onLiveEvent, reloadOnChange } from './live-events';
import { FakeEventSource } from './testing/fake-event-source';

function setUp(): { live: LiveEvents; sources: FakeEventSource[] } {
  const sources: FakeEventSource[] = [];
  const open = (url: string): FakeEventSource => {
    const source = new FakeEventSource(url);
    sources.push(source);
    return source;
  };
  TestBed.configureTestingModule({ providers: [{ provide: OPEN_EVENT_SOURCE, useValue: open }] });
  return { live: TestBed.inject(LiveEvents), sources };
}

describe('LiveEvents', () => {
  afterEach(() => jest.useRealTimers());

  it('opens one stream and says how it stands', () => {
    const { live, sources } = setUp();
    expect(live.state()).toBe('off');
    live.connect();
    live.connect();
    expect(sources.map((source) => source.url)).toEqual(['/api/live']);
    expect(live.state()).toBe('connecting');
    sources[0].accept();
    expect(live.state()).toBe('live');
    sources[0].breakOff('tries-again');
    expect(live.state()).toBe('lost');
    live.disconnect();
    expect(live.state()).toBe('off');
    expect(sources[0].readyState).toBe(2);
  });

  it('opens anew what the browser gave up, and counts that events may have been missed', () => {
    jest.useFakeTimers();
    const { live, sources } = setUp();
    live.connect();
    sources[0].accept();
    sources[0].breakOff('gave-up');
    jest.advanceTimersByTime(5_000);
    expect(sources).toHaveLength(2);
    expect(live.reopened()).toBe(0);
    sources[1].accept();
    expect(live.reopened()).toBe(1);
    expect(live.state()).toBe('live');
  });

  it('passes on what it knows and lets the rest go by', () => {
    const { live, sources } = setUp();
    live.connect();
    sources[0].tell({ kind: 'plan-issued', number: 4 });
    expect(live.last()).toEqual({ kind: 'plan-issued', number: 4 });
    sources[0].tell({ kind: 'of-next-year' });
    sources[0].tell('not JSON');
    expect(live.last()).toEqual({ kind: 'plan-issued', number: 4 });
  });
});

describe('onLiveEvent', () => {
  it('tells events from then on, the same twice as two, and null after a reconnection', () => {
    const { live, sources } = setUp();
    live.connect();
    sources[0].accept();
    sources[0].tell({ kind: 'plan-revised', revision: 1 });
    const told: unknown[] = [];
    TestBed.runInInjectionContext(() => onLiveEvent((event) => told.push(event)));
    TestBed.tick();
    expect(told).toEqual([]);
    sources[0].tell({ kind: 'plan-revised', revision: 2 });
    TestBed.tick();
    sources[0].tell({ kind: 'plan-revised', revision: 2 });
    TestBed.tick();
    expect(told).toHaveLength(2);
    sources[0].breakOff('tries-again');
    sources[0].accept();
    TestBed.tick();
    expect(told[2]).toBeNull();
  });
});

describe('reloadOnChange', () => {
  it('reads again for its own kinds of records only', () => {
    const { live, sources } = setUp();
    live.connect();
    const reload = jest.fn();
    TestBed.runInInjectionContext(() => reloadOnChange({ reload }, 'maker', 'leave'));
    TestBed.tick();
    sources[0].tell({ kind: 'record-changed', subject: 'bay', id: null });
    TestBed.tick();
    expect(reload).not.toHaveBeenCalled();
    sources[0].tell({ kind: 'record-changed', subject: 'leave', id: null });
    TestBed.tick();
    expect(reload).toHaveBeenCalledTimes(1);
  });
});
