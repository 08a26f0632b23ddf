import { ContentContainerComponentHarness } from '@angular/cdk/testing';

/** Drives a state panel as a person would read and press it. */
export class StatePanelHarness extends ContentContainerComponentHarness {
  static readonly hostSelector = 'fettle-state-panel';

  private readonly retry = this.locatorForOptional('button');
  private readonly alert = this.locatorForOptional('[role="alert"]');
  private readonly empty = this.locatorForOptional('.empty');

  /** All that it says. */
  async text(): Promise<string> {
    return (await this.host()).text();
  }

  async isBusy(): Promise<boolean> {
    return (await (await this.host()).getAttribute('aria-busy')) === 'true';
  }

  /** Whether it speaks up to a screen reader. */
  async isAlarming(): Promise<boolean> {
    return (await this.alert()) !== null;
  }

  async isEmpty(): Promise<boolean> {
    return (await this.empty()) !== null;
  }

  /** Presses "Try again". */
  async tryAgain(): Promise<void> {
    const button = await this.retry();
    if (button === null) {
      throw new Error('There is nothing to try again.');
    }
    await button.click();
  }
}
