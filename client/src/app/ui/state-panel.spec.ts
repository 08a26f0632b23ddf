import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { ApiFailure, type ReadState } from '../api';
import { StatePanel } from './state-panel';
import { StatePanelHarness } from './testing/state-panel-harness';

@Component({
  selector: 'fettle-panel-under-test',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [StatePanel],
  template: `
    <fettle-state-panel [read]="read" emptyTitle="No bays yet" emptyHint="Add one.">
      <p>The bays</p>
      <button emptyAction type="button">Add</button>
    </fettle-state-panel>
  `,
})
class Panel {
  reloads = 0;
  readonly state = signal<ReadState>('loading');
  readonly failure = signal<ApiFailure | null>(null);
  readonly read = { state: this.state, failure: this.failure, reload: () => (this.reloads += 1) };
}

const failure = new ApiFailure({
  kind: 'unexpected',
  status: 500,
  title: 'Oh',
  detail: 'Try later.',
  requestId: 'r-9',
});

async function setUp(state: ReadState, failed: ApiFailure | null = null) {
  const fixture = TestBed.createComponent(Panel);
  fixture.componentInstance.state.set(state);
  fixture.componentInstance.failure.set(failed);
  const panel = await TestbedHarnessEnvironment.loader(fixture).getHarness(StatePanelHarness);
  return { panel, page: fixture.componentInstance };
}

describe('StatePanel', () => {
  it.each(['idle', 'loading'] as const)('says that it is reading while %s', async (state) => {
    const { panel } = await setUp(state);
    expect(await panel.isBusy()).toBe(true);
    expect(await panel.text()).toBe('Reading…');
  });

  it('shows its content when ready', async () => {
    const { panel } = await setUp('ready');
    expect(await panel.isBusy()).toBe(false);
    expect(await panel.text()).toBe('The bays');
  });

  it('says what to do first where there is nothing', async () => {
    const { panel } = await setUp('empty');
    expect(await panel.isEmpty()).toBe(true);
    const text = await panel.text();
    expect(text).toContain('No bays yet');
    expect(text).toContain('Add one.');
    expect(text).not.toContain('The bays');
  });

  it('says what went wrong, names the request, and tries again', async () => {
    const { panel, page } = await setUp('failed', failure);
    expect(await panel.isAlarming()).toBe(true);
    expect(await panel.text()).toContain('Try later.');
    expect(await panel.text()).toContain('r-9');
    await panel.tryAgain();
    expect(page.reloads).toBe(1);
  });

  it('keeps what was read before in view where a newer read failed, and says so', async () => {
    const { panel } = await setUp('stale', failure);
    const text = await panel.text();
    expect(text).toContain('This is from before');
    expect(text).toContain('The bays');
  });

  it('says nothing while a newer read is under way', async () => {
    const { panel } = await setUp('stale');
    expect(await panel.text()).toBe('The bays');
  });
});
